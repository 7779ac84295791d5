package org.laddergate.app;

import java.nio.file.NoSuchFileException;
import java.util.Map;
import java.util.function.Function;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.measurement.InvalidInputException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.ParseResult;

/** The command line. */
@Command(name = "laddergate", mixinStandardHelpOptions = true, versionProvider = Commands.Version.class,
        description = "Screens power parts at the end of a production line by their thermal transient.",
        synopsisSubcommandLabel = "COMMAND")
final class Commands {
    private static final Logger LOG = LoggerFactory.getLogger(Commands.class);

    private Commands() {}

    /**
     * @param wiring        what stands behind the commands
     * @param environment   environment variables
     */
    static CommandLine line(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        CommandLine line = new CommandLine(new Commands());
        line.addSubcommand(configured(new ServeCommand(wiring, environment), Setting.values()));
        line.addSubcommand(configured(new LearnCommand(wiring, environment), Setting.GOLDEN_UNITS, Setting.LIMITS));
        line.addSubcommand(configured(new ReleaseCommand(wiring, environment), Setting.LIMITS));
        line.addSubcommand(configured(new JudgeCommand(wiring, environment), Setting.LIMITS, Setting.MAX_SAMPLES));
        line.addSubcommand(configured(new DemoCommand(wiring, environment), Setting.values()));
        line.addSubcommand(new TokenCommand());
        line.setExecutionExceptionHandler(Commands::explain);
        return line;
    }

    private static CommandLine configured(Object command, Setting... settings) {
        CommandLine line = new CommandLine(command);
        SettingOptions.add(line.getCommandSpec(), settings);
        return line;
    }

    /** What the caller did wrong is told in a sentence; everything else is a fault of ours and gets its stack trace. */
    private static int explain(Exception e, CommandLine line, ParseResult parsed) {
        if (e instanceof InvalidInputException invalid) {
            invalid.faults().forEach(fault -> line.getErr().println(fault.pointer() + ": " + fault.detail()));
        } else if (e instanceof LimitNotFoundException || e instanceof IllegalArgumentException
                || e instanceof IllegalStateException || e instanceof NoSuchFileException) {
            line.getErr().println(e instanceof NoSuchFileException ? "no such file: " + e.getMessage()
                    : e.getMessage());
            LOG.debug("refused", e);
        } else {
            LOG.error("failed", e);
        }
        return line.getCommandSpec().exitCodeOnExecutionException();
    }

    /** Version of the jar this runs from. */
    static final class Version implements CommandLine.IVersionProvider {
        @Override
        public String[] getVersion() {
            String version = Commands.class.getPackage().getImplementationVersion();
            return new String[] {"laddergate " + (version == null ? "(not packaged)" : version)};
        }
    }
}
