package org.laddergate.app;

import java.util.Map;
import java.util.concurrent.Callable;
import java.util.function.Function;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Releases a draft. */
@Command(name = "release", mixinStandardHelpOptions = true, sortOptions = false,
        description = "Release a draft; the revision released before is withdrawn.")
final class ReleaseCommand implements Callable<Integer> {
    private final Function<Settings, Wiring> wiring;
    private final Map<String, String> environment;
    @Spec
    private CommandSpec spec;
    @Parameters(index = "0", paramLabel = "<product>", description = "product name")
    private String product;
    @Parameters(index = "1", paramLabel = "<revision>", description = "revision number of the draft")
    private int revision;
    @Option(names = "--reason", required = true, paramLabel = "<text>", description = "why it is released")
    private String reason;
    @Option(names = "--by", required = true, paramLabel = "<name>", description = "who releases it")
    private String by;

    ReleaseCommand(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        this.wiring = wiring;
        this.environment = environment;
    }

    @Override
    public Integer call() {
        if (reason.isBlank() || by.isBlank()) {
            throw new IllegalArgumentException("--reason and --by must say something");
        }
        try (Wiring wired = wiring.apply(SettingOptions.read(spec, environment))) {
            LearnCommand.print(wired.limits().release(product, revision, by.strip(), reason.strip()),
                    spec.commandLine().getOut());
        }
        return 0;
    }
}
