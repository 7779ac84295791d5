package org.laddergate.limits;

/**
 * How limits are learnt and how a verdict is decided.
 *
 * @param content                share of the golden family a tolerance interval must hold (ISO 16269-6), in (0, 1)
 * @param confidenceLevel        confidence of that statement, in (0, 1)
 * @param rule                   decision rule in the terms of JCGM 106
 * @param specificRisk           risk that sets the guard band of the guarded rules, in (0, 0.5]
 * @param falseRejectRisk        share of in-family parts that the in-family tests together may reject, in (0, 0.2]
 * @param priorFaultRate         share of parts expected to have a fault, in (0, 0.5]
 */
public record DecisionSettings(double content, double confidenceLevel, DecisionRule rule, double specificRisk,
        double falseRejectRisk, double priorFaultRate) {

    /** Content 0.99 at confidence 0.95, simple acceptance; risk and fault rate: common practice, no source. */
    public static final DecisionSettings DEFAULT =
            new DecisionSettings(0.99, 0.95, DecisionRule.SIMPLE_ACCEPTANCE, 0.05, 0.005, 0.02);

    public DecisionSettings {
        require(content > 0 && content < 1, "content", content);
        require(confidenceLevel > 0 && confidenceLevel < 1, "confidenceLevel", confidenceLevel);
        require(specificRisk > 0 && specificRisk <= 0.5, "specificRisk", specificRisk);
        require(falseRejectRisk > 0 && falseRejectRisk <= 0.2, "falseRejectRisk", falseRejectRisk);
        require(priorFaultRate > 0 && priorFaultRate <= 0.5, "priorFaultRate", priorFaultRate);
    }

    private static void require(boolean good, String field, double value) {
        if (!good) {
            throw new IllegalArgumentException(field + " " + value + " is out of range");
        }
    }
}
