package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assertions.fail;

import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.laddergate.measurement.InvalidInputException;

/** Damaged bodies, from fixed seeds: every one is judged or refused, none breaks anything. */
class FuzzTest {
    private static final List<String> SNIPPETS = List.of("null", "NaN", "-", "1e400", "\"", "{", "}", "[", "]", ",",
            ":", "\\u0000", "\\ud800", "\"serial\":", "true", "1e-400", "0x1", "\u00E4", "//", "/*", "'", "9999999999",
            "-Infinity", "\"timeSeconds\":[", "\n", "\r", "#", "steady-state", "\"sensor\":{}", "\uD83D\uDD25");

    private static byte[] mutate(byte[] original, Random random) {
        byte[] body = original.clone();
        int changes = 1 + random.nextInt(4);
        for (int i = 0; i < changes; i++) {
            int at = random.nextInt(body.length);
            switch (random.nextInt(6)) {
                case 0 -> body[at] ^= (byte) (1 << random.nextInt(8));
                case 1 -> body = Arrays.copyOf(body, Math.max(1, at));
                case 2 -> body = splice(body, at, at, SNIPPETS.get(random.nextInt(SNIPPETS.size()))
                        .getBytes(StandardCharsets.UTF_8));
                case 3 -> body = splice(body, at, Math.min(body.length, at + 1 + random.nextInt(30)), new byte[0]);
                case 4 -> body = splice(body, at, at,
                        Arrays.copyOfRange(body, at, Math.min(body.length, at + random.nextInt(60))));
                default -> body[at] = (byte) ("0123456789-+.eE\"[]{},: ".charAt(random.nextInt(23)));
            }
            if (body.length == 0) {
                return new byte[] {' '};
            }
        }
        return body;
    }

    private static byte[] splice(byte[] body, int from, int to, byte[] insert) {
        byte[] out = new byte[body.length - (to - from) + insert.length];
        System.arraycopy(body, 0, out, 0, from);
        System.arraycopy(insert, 0, out, from, insert.length);
        System.arraycopy(body, to, out, from + insert.length, body.length - to);
        return out;
    }

    private static byte[] json() {
        return TestService.curve("f", 80).replace("\"lot\"", "\"sensor\":{\"polynomialCelsius\":[1,2,3]},\"lot\"")
                .getBytes(StandardCharsets.UTF_8);
    }

    private static byte[] csv() {
        StringBuilder text = new StringBuilder("# measurementId: f\n# product: hb40\n# serial: \u00E4\n"
                + "# measuredAt: 2026-12-01T08:00:00Z\n# heatingSeconds: 4\ntimeSeconds,temperatureCelsius\n");
        for (int i = 1; i < 12; i++) {
            text.append(i).append("e-3,").append(100 - i).append(".5\r\n");
        }
        return text.toString().getBytes(StandardCharsets.UTF_8);
    }

    @Test
    void damagedJson_isReadOrRefused() {
        Random random = new Random(20261201);
        int refused = 0;
        for (int i = 0; i < 20_000; i++) {
            byte[] body = mutate(json(), random);
            try {
                SubmissionJson.parse(body, 1000);
            } catch (ProblemException e) {
                refused++;
            } catch (RuntimeException e) {
                fail("mutation " + i + ": " + new String(body, StandardCharsets.ISO_8859_1), e);
            }
        }
        assertTrue(refused > 5_000 && refused < 19_000, refused + " refused");
    }

    @Test
    void damagedCsv_isReadOrRefused() {
        Random random = new Random(20261202);
        int refused = 0;
        for (int i = 0; i < 20_000; i++) {
            byte[] body = mutate(csv(), random);
            try {
                SubmissionCsv.parse(body, Map.of(), 1000);
            } catch (InvalidInputException e) {
                refused++;
            } catch (RuntimeException e) {
                fail("mutation " + i + ": " + new String(body, StandardCharsets.ISO_8859_1), e);
            }
        }
        assertTrue(refused > 5_000 && refused < 19_000, refused + " refused");
    }

    @Test
    void damagedProducts_areReadOrRefused() {
        Random random = new Random(20261203);
        byte[] product = TestService.PRODUCT.getBytes(StandardCharsets.UTF_8);
        for (int i = 0; i < 20_000; i++) {
            byte[] body = mutate(product, random);
            try {
                ProductJson.read("hb40", Json.tree(body));
            } catch (ProblemException | InvalidInputException e) {
                assertTrue(!e.getMessage().isEmpty());
            } catch (RuntimeException e) {
                fail("mutation " + i + ": " + new String(body, StandardCharsets.ISO_8859_1), e);
            }
        }
    }

    @Test
    @Tag("http")
    void damagedRequests_neverBreakTheService() throws Exception {
        Random random = new Random(20261204);
        HttpClient client = HttpClient.newHttpClient();
        try (TestService service = TestService.ready()) {
            for (int i = 0; i < 600; i++) {
                String[] target = List.of(new String[] {"/v1/transients", "application/json"},
                        new String[] {"/v1/transients", "text/csv"},
                        new String[] {"/v1/products/hb40/golden-units", "application/json"},
                        new String[] {"/v1/transients/batch", "application/x-ndjson"}).get(i % 4);
                byte[] body = mutate(target[1].equals("text/csv") ? csv() : json(), random);
                HttpRequest.Builder request = HttpRequest.newBuilder(
                        URI.create("http://127.0.0.1:" + service.http.port() + target[0]))
                        .header("Content-Type", target[1]).POST(HttpRequest.BodyPublishers.ofByteArray(body));
                if (random.nextInt(10) == 0) {
                    request.header("Content-Encoding", "gzip");
                }
                HttpResponse<String> answer = client.send(request.build(), HttpResponse.BodyHandlers.ofString());
                String what = answer.statusCode() + " " + answer.body() + " to "
                        + new String(body, StandardCharsets.ISO_8859_1);
                assertTrue(answer.statusCode() < 500 && !answer.body().contains("\"status\":500"), what);
                assertTrue(!answer.body().contains("Exception") && !answer.body().contains("\\tat "), what);
            }
            service.request().contentType("application/json").body(TestService.curve("after", 80))
                    .post("/v1/transients").then().statusCode(200);
        }
    }
}
