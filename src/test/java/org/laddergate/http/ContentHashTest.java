package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;

import java.nio.charset.StandardCharsets;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

class ContentHashTest {
    private static final String BODY = TestService.curve("m", 80);

    private static String hash(String json) {
        return ContentHash.of(SubmissionJson.parse(json.getBytes(StandardCharsets.UTF_8), 1000).submission());
    }

    @Test
    void howItIsWritten_doesNotMatter() {
        assertEquals(hash(BODY), hash(BODY.replace(":", " : ").replaceAll("T08 : 15 : 30.123\\+01 : 00",
                "T08:15:30.123000+01:00")));
        assertEquals(hash(BODY), hash(BODY.replace("80.0", "8e1").replace("105.000000", "105")));
        assertEquals(hash(BODY), hash(BODY.replace("\"lot\"", "\"colour\":\"red\",\"lot\"")));
    }

    static Stream<Arguments> changes() {
        return Map.ofEntries(Map.entry("\"m\"", "\"n\""), Map.entry("hb40", "hb41"),
                Map.entry("24A7-0193", "24A7-0194"), Map.entry("L2411", "L2412"),
                Map.entry("eol3", "eol4"), Map.entry("30.123", "30.124"),
                Map.entry("+01:00", "+02:00"), Map.entry("\"curve\":\"cooling\",", ""),
                Map.entry("Watts\":80.0", "Watts\":80.00000000000001"), Map.entry("\"heatingSeconds\":4.0,", ""),
                Map.entry("105.000000", "105.00000000000001"), Map.entry("1.000000000e-05", "1.0000000000000002e-05"),
                Map.entry("temperatureCelsius", "voltageVolts"),
                Map.entry("\"lot\"", "\"sensor\":{\"polynomialCelsius\":[1,2]},\"lot\""),
                Map.entry("\"lot\":\"L2411\",\"station\":\"eol3\"", "\"lot\":\"L2411eol3\"")).entrySet().stream()
                .map(change -> Arguments.of(change.getKey(), change.getValue()));
    }

    @ParameterizedTest
    @MethodSource("changes")
    void whatIsSaid_matters(String was, String becomes) {
        String changed = BODY.replace(was, becomes);
        assertNotEquals(BODY, changed);
        assertNotEquals(hash(BODY), hash(changed));
    }

    /**
     * Hashes are stored for ever: an accidental change of the form would turn every resent measurement into a conflict.
     * The value was computed from the described form by Python's hashlib and struct.
     */
    @Test
    @Tag("non-regression")
    void form_staysAsItIs() {
        assertEquals("e91720bd95a66ef9d862f66766a31bff7735d9898348802a103232f9f514f96c", hash(BODY));
    }
}
