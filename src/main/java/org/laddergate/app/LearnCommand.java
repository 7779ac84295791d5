package org.laddergate.app;

import java.io.PrintWriter;
import java.util.Locale;
import java.util.Map;
import java.util.concurrent.Callable;
import java.util.function.Function;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.Product;
import org.laddergate.limits.RegionLimit;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Learns a draft from the golden units in their folder. */
@Command(name = "learn", mixinStandardHelpOptions = true, sortOptions = false,
        description = "Learn limits of a product from its golden units and store them as a draft.")
final class LearnCommand implements Callable<Integer> {
    private final Function<Settings, Wiring> wiring;
    private final Map<String, String> environment;
    @Spec
    private CommandSpec spec;
    @Parameters(paramLabel = "<product>", description = "product name")
    private String product;

    LearnCommand(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        this.wiring = wiring;
        this.environment = environment;
    }

    @Override
    public Integer call() {
        try (Wiring wired = wiring.apply(SettingOptions.read(spec, environment))) {
            Product definition = wired.products().find(product).orElseThrow(
                    () -> new LimitNotFoundException("unknown_product", "there is no product '" + product + "'"));
            LimitSet learnt = wired.learning().learn(definition, wired.goldenUnits().units(product));
            print(wired.limits().saveDraft(learnt), spec.commandLine().getOut());
        }
        return 0;
    }

    static void print(LimitSet limits, PrintWriter out) {
        out.printf(Locale.ROOT, "%s revision %d, %s, from %d golden units, sha256 %s%n", limits.product(),
                limits.revision(), limits.state().word(), limits.goldenUnits(), limits.sha256());
        for (RegionLimit limit : limits.regionLimits()) {
            out.printf(Locale.ROOT, "  %-16s %-8s %.6g to %.6g K/W, golden mean %.6g K/W%s%n", limit.region().name(),
                    limit.region().role().word(), limit.lowerKelvinPerWatt(), limit.upperKelvinPerWatt(),
                    limit.goldenMeanKelvinPerWatt(), limit.assessed() ? "" : " (not assessed)");
        }
        limits.remarks().forEach(remark -> out.println("  " + remark));
        out.flush();
    }
}
