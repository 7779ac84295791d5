package org.laddergate.app;

import java.net.InetAddress;
import java.net.UnknownHostException;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.laddergate.http.HttpSettings;

/**
 * All settings, checked.
 *
 * @param http          how the service listens
 * @param data          folder of stored verdicts
 * @param goldenUnits   folder of golden units
 * @param limits        folder of products and limit sets
 * @param tokenFile     who may call, if tokens are in use
 */
record Settings(HttpSettings http, Path data, Path goldenUnits, Path limits, Optional<Path> tokenFile) {

    /** Reads all settings and tells all faults at once. */
    static Settings of(Map<Setting, String> options, Map<String, String> environment) {
        Reader reader = new Reader(options, environment);
        int threads = reader.number(Setting.ANALYSIS_THREADS, 0, 1000);
        HttpSettings http = new HttpSettings(reader.text(Setting.HOST), reader.number(Setting.PORT, 0, 65535),
                reader.number(Setting.MAX_BODY_BYTES, 1000, 1_000_000_000),
                reader.number(Setting.MAX_SAMPLES, 100, 10_000_000),
                reader.number(Setting.REQUEST_THREADS, 4, 1000),
                threads == 0 ? Runtime.getRuntime().availableProcessors() : threads,
                Duration.ofSeconds(reader.number(Setting.DRAIN_SECONDS, 0, 600)));
        Optional<Path> tokens = reader.text(Setting.TOKENS).isEmpty() ? Optional.empty()
                : Optional.of(reader.path(Setting.TOKENS));
        Settings settings = new Settings(http, reader.path(Setting.DATA), reader.path(Setting.GOLDEN_UNITS),
                reader.path(Setting.LIMITS), tokens);
        reader.exposure(http.host(), tokens.isPresent(), reader.isOn(Setting.TLS_ENDS_AT_PROXY));
        if (!reader.faults.isEmpty()) {
            throw new IllegalArgumentException(String.join(System.lineSeparator(), reader.faults));
        }
        return settings;
    }

    private static final class Reader {
        private final Map<Setting, String> options;
        private final Map<String, String> environment;
        private final List<String> faults = new ArrayList<>();

        Reader(Map<Setting, String> options, Map<String, String> environment) {
            this.options = options;
            this.environment = environment;
        }

        String text(Setting setting) {
            return setting.value(options, environment).strip();
        }

        int number(Setting setting, int lowest, int highest) {
            String text = text(setting);
            if (text.matches("[0-9]{1,10}")) {
                long number = Long.parseLong(text);
                if (number >= lowest && number <= highest) {
                    return (int) number;
                }
            }
            fault(setting, "'" + text + "' is not a whole number from " + lowest + " to " + highest);
            return lowest;
        }

        boolean isOn(Setting setting) {
            String text = text(setting);
            if (!text.equals("true") && !text.equals("false")) {
                fault(setting, "'" + text + "' is neither true nor false");
            }
            return text.equals("true");
        }

        Path path(Setting setting) {
            try {
                String text = text(setting);
                if (text.isEmpty()) {
                    fault(setting, "is empty");
                }
                return Path.of(text);
            } catch (InvalidPathException e) {
                fault(setting, "is not a path: " + e.getMessage());
                return Path.of("");
            }
        }

        /** Whoever reaches the port may release limits, so reaching it must take more than a network cable. */
        void exposure(String host, boolean tokens, boolean proxy) {
            try {
                if (!InetAddress.getByName(host).isLoopbackAddress() && !(tokens && proxy)) {
                    fault(Setting.HOST, host + " can be reached from other machines; give a token file ("
                            + Setting.TOKENS.option() + ") and let a proxy end TLS ("
                            + Setting.TLS_ENDS_AT_PROXY.option() + "), or bind to 127.0.0.1");
                }
            } catch (UnknownHostException e) {
                fault(Setting.HOST, "'" + host + "' is not an address of this machine");
            }
        }

        private void fault(Setting setting, String what) {
            faults.add(setting.option() + " (" + setting.variable() + "): " + what);
        }
    }
}
