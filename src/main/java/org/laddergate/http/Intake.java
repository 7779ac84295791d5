package org.laddergate.http;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;
import org.laddergate.measurement.CurveRules;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Submission;

/**
 * From what was sent to a measurement that may be judged, or to all its faults.
 *
 * @param rules     what is possible
 * @param products  where recipes come from
 */
record Intake(CurveRules rules, ProductStore products) {

    /**
     * Something that may be judged.
     *
     * @param measurement   with what the recipe fills in
     * @param submission    what was sent
     * @param contentSha256 hash of what was sent
     * @param warnings      what was ignored
     */
    record Accepted(Measurement measurement, Submission submission, String contentSha256, List<String> warnings) {}

    Accepted accept(SubmissionJson.Parsed parsed) {
        Submission sent = parsed.submission();
        List<InputFault> faults = new ArrayList<>(parsed.faults());
        faults.addAll(unreported(rules.faults(sent), parsed.faults()));
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        Measurement measurement = rules.measurement(sent, product(sent.product()).recipe());
        return new Accepted(measurement, sent, ContentHash.of(sent), parsed.warnings());
    }

    Product product(String name) {
        return products.find(name).orElseThrow(() -> unknown(name).asException());
    }

    static Problem unknown(String product) {
        String shown = product.length() <= 64 ? product : product.substring(0, 64) + "...";
        return Problem.of(ProblemCode.UNKNOWN_PRODUCT,
                new InputFault("/product", "unknown_product", "there is no product '" + shown + "'"));
    }

    /** A field that could not be read looks missing to the rules; it is reported once. */
    private static List<InputFault> unreported(List<InputFault> found, List<InputFault> reported) {
        Set<String> fields = new HashSet<>();
        reported.forEach(fault -> fields.add(field(fault)));
        return found.stream().filter(fault -> !fields.contains(field(fault))).toList();
    }

    private static String field(InputFault fault) {
        int end = fault.pointer().indexOf('/', 1);
        return end < 0 ? fault.pointer() : fault.pointer().substring(0, end);
    }
}
