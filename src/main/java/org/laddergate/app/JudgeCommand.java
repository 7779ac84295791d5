package org.laddergate.app;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Map;
import java.util.concurrent.Callable;
import java.util.function.Function;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.LimitSet;
import org.laddergate.measurement.CurveFile;
import org.laddergate.measurement.CurveRules;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Submission;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.RegionResult;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Judges one curve file against the released limits; stores nothing. */
@Command(name = "judge", mixinStandardHelpOptions = true, sortOptions = false,
        description = {"Judge a curve file against the released limits of its product and print the verdict.",
            "Nothing is stored. Exit code: 0 pass, 3 fail, 4 invalid measurement, 1 no verdict."})
final class JudgeCommand implements Callable<Integer> {
    static final int EXIT_FAIL = 3;
    static final int EXIT_INVALID = 4;

    private final Function<Settings, Wiring> wiring;
    private final Map<String, String> environment;
    @Spec
    private CommandSpec spec;
    @Parameters(paramLabel = "<curve file>", description = "CSV file with a curve")
    private Path file;
    @Option(names = "--product", paramLabel = "<name>", defaultValue = "",
            description = "product name where the file does not say it")
    private String product;

    JudgeCommand(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        this.wiring = wiring;
        this.environment = environment;
    }

    @Override
    public Integer call() throws IOException {
        try (Wiring wired = wiring.apply(SettingOptions.read(spec, environment))) {
            CurveRules rules = new CurveRules(wired.settings().http().maximumSamples(), wired.clock());
            Submission sent = completed(CurveFile.read(Files.readAllBytes(file), rules.maximumSamples()).submission());
            LimitSet limits = wired.limits().released(sent.product()).orElseThrow(() -> new LimitNotFoundException(
                    "no_released_limits", "product '" + sent.product() + "' has no released limits"));
            Measurement measurement = rules.measurement(sent, limits.recipe());
            Judgement judgement = wired.curveJudge().judge(measurement, limits);
            print(measurement, judgement, spec.commandLine().getOut());
            return judgement.outcome() == Outcome.PASS ? 0
                    : judgement.outcome() == Outcome.FAIL ? EXIT_FAIL : EXIT_INVALID;
        }
    }

    /** A file on an engineer's desk need not carry what a tester must send. */
    private Submission completed(Submission sent) {
        Submission.Builder fields = sent.toBuilder();
        if (sent.measurementId().isEmpty()) {
            fields.text("measurementId", file.getFileName().toString());
        }
        if (sent.serial().isEmpty()) {
            fields.text("serial", "not given");
        }
        if (sent.product().isEmpty()) {
            fields.text("product", product);
        }
        return fields.build();
    }

    private static void print(Measurement measurement, Judgement judgement, PrintWriter out) {
        out.printf(Locale.ROOT, "%s: %s, %s%s, confidence %s%n", measurement.measurementId(),
                judgement.outcome().word(), judgement.disposition().word(),
                judgement.failingRegion().isEmpty() ? "" : ", region " + judgement.failingRegion(),
                Double.isNaN(judgement.decisionConfidence()) ? "none"
                        : String.format(Locale.ROOT, "%.3f", judgement.decisionConfidence()));
        out.printf(Locale.ROOT, "limits %s revision %d, %s%n", measurement.product(), judgement.limitRevision(),
                judgement.limitSha256());
        for (RegionResult region : judgement.regions()) {
            out.printf(Locale.ROOT, "  %-16s %s%n", region.region(), region.assessed()
                    ? String.format(Locale.ROOT, "%.6g K/W, limits %.6g to %.6g K/W", region.resistanceKelvinPerWatt(),
                            region.lowerLimitKelvinPerWatt(), region.upperLimitKelvinPerWatt())
                    : "not assessed");
        }
        judgement.reasons().forEach(reason -> out.println("  " + reason.code() + ": " + reason.sentence()));
        out.flush();
    }
}
