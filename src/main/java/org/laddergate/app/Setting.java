package org.laddergate.app;

import java.util.Map;
import org.laddergate.http.HttpSettings;
import org.laddergate.measurement.CurveRules;

/** Every setting there is: one table for the command line, the environment, {@code --help} and the manual. */
enum Setting {
    PORT("port", "number", "8080", "TCP port to listen on, 0 to 65535; 0 takes any free one"),
    HOST("host", "address", "127.0.0.1", "address to bind to; anything but this machine needs tokens and TLS"),
    DATA("data", "folder", "data", "folder of stored verdicts"),
    GOLDEN_UNITS("golden-units", "folder", "golden-units", "folder of golden and known-bad units"),
    LIMITS("limits", "folder", "limits", "folder of product definitions and limit sets"),
    TOKENS("tokens", "file", "", "token file, lines of 'tester|engineer|mes name sha256-in-hex'"),
    TLS_ENDS_AT_PROXY("tls-ends-at-proxy", "", "false",
            "a proxy in front of the service ends TLS; nobody else reaches the port"),
    MAX_BODY_BYTES("max-body-bytes", "bytes", Integer.toString(HttpSettings.DEFAULT_BODY_BYTES),
            "largest accepted body, decompressed, 1000 to 1000000000"),
    MAX_SAMPLES("max-samples", "number", Integer.toString(CurveRules.DEFAULT_MAXIMUM_SAMPLES),
            "longest accepted curve, 100 to 10000000"),
    REQUEST_THREADS("request-threads", "number", Integer.toString(HttpSettings.DEFAULT_REQUEST_THREADS),
            "requests received at once, 4 to 1000"),
    ANALYSIS_THREADS("analysis-threads", "number", "0", "curves computed at once, up to 1000; 0: one per core"),
    DRAIN_SECONDS("drain-seconds", "seconds", "10", "time for running requests to finish at the end, 0 to 600");

    private final String option;
    private final String parameter;
    private final String standard;
    private final String help;

    Setting(String option, String parameter, String standard, String help) {
        this.option = option;
        this.parameter = parameter;
        this.standard = standard;
        this.help = help;
    }

    /** On the command line. */
    String option() {
        return "--" + option;
    }

    /** In the environment. */
    String variable() {
        return "LADDERGATE_" + name();
    }

    /** Kind of value; empty for a switch that is on when it is given. */
    String parameter() {
        return parameter;
    }

    /** Where nothing is said. */
    String standard() {
        return standard;
    }

    String help() {
        return help;
    }

    /** As given on the command line, else in the environment, else the standard. */
    String value(Map<Setting, String> options, Map<String, String> environment) {
        String given = options.get(this);
        return given != null ? given : environment.getOrDefault(variable(), standard);
    }
}
