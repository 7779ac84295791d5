package org.laddergate.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.net.InetAddress;
import java.net.ServerSocket;
import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.time.ZoneOffset;
import java.util.List;
import java.util.Map;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.golden.GoldenUnit;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.SampledCurve;
import picocli.CommandLine;

class CommandsTest {
    @TempDir
    private Path folder;
    private final StringWriter out = new StringWriter();
    private final InMemoryWiring wiring = new InMemoryWiring(Settings.of(Map.of(), Map.of()));

    private int run(String... arguments) {
        out.getBuffer().setLength(0);
        CommandLine line = Commands.line(settings -> wiring, Map.of());
        PrintWriter writer = new PrintWriter(out, true);
        return line.setOut(writer).setErr(writer).execute(arguments);
    }

    private void define() {
        Recipe recipe = Recipe.of(CurveKind.COOLING, 80, 4, 4e-5, 2);
        wiring.products.save(new Product("hb40", recipe, List.of(), List.of(new Region("a", RegionRole.PART, 0, 1)),
                DecisionSettings.DEFAULT));
        double[] t = IntStream.rangeClosed(1, 9).asDoubleStream().toArray();
        double[] v = IntStream.rangeClosed(1, 9).mapToDouble(i -> 115 - 10.0 * i).toArray();
        wiring.goldenUnits.add(new GoldenUnit(new Measurement("g1", "hb40", "s", "", "",
                OffsetDateTime.of(2026, 12, 1, 8, 0, 0, 0, ZoneOffset.UTC), CurveKind.COOLING, 80, 4,
                SampledCurve.copyOf(t, v)), GoldenUnit.Condition.GOLDEN, ""));
    }

    private Path curve(double kelvin) throws IOException {
        String rows = IntStream.rangeClosed(1, 9).mapToObj(i -> i + "," + (25 + kelvin * (9 - i) / 8))
                .collect(Collectors.joining("\n"));
        return Files.writeString(folder.resolve("curve.csv"), "timeSeconds,temperatureCelsius\n" + rows + "\n");
    }

    @Test
    void learnReleaseJudge_walkOverFolders() throws IOException {
        define();
        assertEquals(0, run("learn", "hb40"), out::toString);
        assertTrue(out.toString().startsWith("hb40 revision 1, draft, from 1 golden units"), out.toString());
        assertEquals(1, run("judge", curve(80).toString(), "--product", "hb40"));
        assertTrue(out.toString().contains("no released limits"), out.toString());
        assertEquals(0, run("release", "hb40", "1", "--reason", "line opens", "--by", "the engineer"));
        assertEquals(List.of("hb40 1 by the engineer: line opens"), wiring.limits.releases());
        assertEquals(0, run("judge", curve(80).toString(), "--product", "hb40"), out::toString);
        assertTrue(out.toString().startsWith("curve.csv: pass, accept, confidence 0.990"), out.toString());
        assertEquals(JudgeCommand.EXIT_FAIL, run("judge", curve(160).toString(), "--product", "hb40"));
        assertTrue(out.toString().contains("region stack"), out.toString());
        assertEquals(JudgeCommand.EXIT_INVALID, run("judge", curve(0).toString(), "--product", "hb40"));
        assertEquals(0, wiring.ledger.size());
    }

    @Test
    void mistakes_areToldInASentence() {
        assertEquals(1, run("learn", "none"));
        assertEquals("there is no product 'none'", out.toString().strip());
        assertEquals(1, run("judge", folder.resolve("missing.csv").toString()));
        assertTrue(out.toString().startsWith("no such file"), out.toString());
        assertEquals(2, run("release", "hb40", "1"));
        assertEquals(1, run("serve", "--port", "x"));
        assertTrue(out.toString().contains("--port (LADDERGATE_PORT): 'x'"), out.toString());
        assertEquals(1, run("serve", "--host", "0.0.0.0"));
    }

    @Test
    void takenPort_isToldInASentence() throws IOException {
        try (ServerSocket taken = new ServerSocket(0, 1, InetAddress.getLoopbackAddress())) {
            assertEquals(1, run("serve", "--port", Integer.toString(taken.getLocalPort())));
            assertEquals("cannot listen on 127.0.0.1:" + taken.getLocalPort()
                    + "; the port is taken or not allowed", out.toString().strip());
        }
    }

    @Test
    void help_listsEverySetting() {
        assertEquals(0, run("serve", "--help"));
        for (Setting setting : Setting.values()) {
            assertTrue(out.toString().contains(setting.option()) && out.toString().contains(setting.variable()),
                    setting.name());
        }
    }

    @Test
    void token_isPrintedWithItsLine() {
        assertEquals(0, run("token", "TESTER", "eol3"));
        assertTrue(out.toString().matches("(?s)token .*: +[A-Za-z0-9_-]{43}\\s+line .*: tester eol3 [0-9a-f]{64}\\s+"),
                out.toString());
    }

    /** The request is on its way to the slow store when the process is asked to end; its answer still comes. */
    @Test
    void sigterm_letsRunningRequestsFinish() throws Exception {
        Process process = new ProcessBuilder(Path.of(System.getProperty("java.home"), "bin", "java").toString(), "-cp",
                System.getProperty("java.class.path"), "-Dlogback.configurationFile=logback.xml",
                InMemoryWiring.class.getName(), "serve", "--port", "0").start();
        try (BufferedReader log = new BufferedReader(new InputStreamReader(process.getErrorStream(),
                StandardCharsets.UTF_8))) {
            String line = log.readLine();
            while (line != null && !line.contains("listening on ")) {
                line = log.readLine();
            }
            String base = "http://" + line.substring(line.indexOf("listening on ") + 13).strip();
            HttpClient client = HttpClient.newHttpClient();
            send(client, base + "/v1/products/p", "PUT", "{\"recipe\":{\"curve\":\"cooling\",\"heatingPowerWatts\":80,"
                    + "\"heatingSeconds\":4,\"recordSeconds\":20},\"regions\":[{\"name\":\"a\","
                    + "\"fromJoulesPerKelvin\":0,\"toJoulesPerKelvin\":1}]}").join();
            String curve = "\"product\":\"p\",\"serial\":\"s\",\"timeSeconds\":[1,2,3,4,5,6,7,8],"
                    + "\"temperatureCelsius\":[100,90,80,70,60,50,40,30]}";
            send(client, base + "/v1/products/p/golden-units", "POST",
                    "{\"condition\":\"golden\",\"measurementId\":\"g\"," + curve).join();
            send(client, base + "/v1/products/p/limits", "POST", "{}").join();
            send(client, base + "/v1/products/p/limits/1/release", "POST", "{\"reason\":\"r\"}").join();
            CompletableFuture<HttpResponse<String>> answer = send(client, base + "/v1/transients", "POST",
                    "{\"measurementId\":\"m\"," + curve);
            Thread.sleep(300);
            process.destroy();
            assertEquals(200, answer.get(20, TimeUnit.SECONDS).statusCode());
            assertTrue(answer.join().body().contains("\"verdict\":\"pass\""), answer.join().body());
            assertTrue(process.waitFor(20, TimeUnit.SECONDS));
            assertEquals(143, process.exitValue());
        } finally {
            process.destroyForcibly();
        }
    }

    private static CompletableFuture<HttpResponse<String>> send(HttpClient client, String address, String method,
            String body) {
        return client.sendAsync(HttpRequest.newBuilder(URI.create(address)).header("Content-Type", "application/json")
                .method(method, HttpRequest.BodyPublishers.ofString(body)).build(),
                HttpResponse.BodyHandlers.ofString());
    }
}
