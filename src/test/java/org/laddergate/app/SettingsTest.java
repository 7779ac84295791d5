package org.laddergate.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SettingsTest {
    private static String faults(Map<Setting, String> options, Map<String, String> environment) {
        return assertThrows(IllegalArgumentException.class, () -> Settings.of(options, environment)).getMessage();
    }

    @Test
    void standards_listenOnThisMachineOnly() {
        Settings settings = Settings.of(Map.of(), Map.of());
        assertEquals("127.0.0.1", settings.http().host());
        assertEquals(8080, settings.http().port());
        assertEquals(16 * 1024 * 1024, settings.http().maximumBodyBytes());
        assertEquals(1_000_000, settings.http().maximumSamples());
        assertEquals(Path.of("golden-units"), settings.goldenUnits());
        assertEquals(Optional.empty(), settings.tokenFile());
    }

    @Test
    void commandLine_winsOverTheEnvironment() {
        Map<String, String> environment = Map.of("LADDERGATE_PORT", "9000", "LADDERGATE_DATA", "/var/lib/x");
        assertEquals(9000, Settings.of(Map.of(), environment).http().port());
        assertEquals(Path.of("/var/lib/x"), Settings.of(Map.of(), environment).data());
        assertEquals(9001, Settings.of(Map.of(Setting.PORT, "9001"), environment).http().port());
    }

    @Test
    void allFaults_areToldAtOnce() {
        String faults = faults(Map.of(Setting.PORT, "70000", Setting.MAX_BODY_BYTES, "16MB"),
                Map.of("LADDERGATE_LIMITS", "", "LADDERGATE_TLS_ENDS_AT_PROXY", "yes"));
        assertTrue(faults.contains("--port (LADDERGATE_PORT): '70000'"), faults);
        assertTrue(faults.contains("--max-body-bytes"), faults);
        assertTrue(faults.contains("--limits"), faults);
        assertTrue(faults.contains("--tls-ends-at-proxy"), faults);
    }

    /** Some orchestrators set the variable PORT of a service's name to an address. */
    @Test
    void addressInsteadOfAPort_isRefused() {
        assertTrue(faults(Map.of(), Map.of("LADDERGATE_PORT", "tcp://10.0.0.1:8080")).contains("LADDERGATE_PORT"));
    }

    @ParameterizedTest
    @ValueSource(strings = {"0.0.0.0", "::", "192.0.2.7"})
    void openAddress_needsTokensAndTls(String host) {
        String token = "tokens.txt";
        assertTrue(faults(Map.of(Setting.HOST, host), Map.of()).contains("--tls-ends-at-proxy"));
        faults(Map.of(Setting.HOST, host, Setting.TOKENS, token), Map.of());
        faults(Map.of(Setting.HOST, host, Setting.TLS_ENDS_AT_PROXY, "true"), Map.of());
        assertEquals(host, Settings.of(Map.of(Setting.HOST, host, Setting.TLS_ENDS_AT_PROXY, "true", Setting.TOKENS,
                token), Map.of()).http().host());
    }

    @ParameterizedTest
    @ValueSource(strings = {"127.0.0.1", "127.0.0.2", "::1", "localhost"})
    void ownMachine_needsNeither(String host) {
        assertEquals(host, Settings.of(Map.of(Setting.HOST, host), Map.of()).http().host());
    }

    @Test
    @Tag("docs")
    void everySetting_isInTheManual() throws IOException {
        String manual = Files.readString(Path.of("docs/http-api.md"));
        for (Setting setting : Setting.values()) {
            assertTrue(manual.contains("| `" + setting.option() + "` | `" + setting.variable() + "` | "
                    + (setting.standard().isEmpty() ? "" : "`" + setting.standard() + "`") + " | " + setting.help()
                    + " |"), setting.name());
        }
    }
}
