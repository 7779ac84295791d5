package org.laddergate.demo;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.io.PrintStream;
import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.time.Clock;
import java.time.OffsetDateTime;
import java.time.format.DateTimeFormatter;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.TreeMap;
import org.laddergate.measurement.CurveFile;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Submission;

/**
 * A simulated production line: draws invented parts, some with a known fault, posts their curves over HTTP like a
 * tester and compares truth with verdict.
 */
public final class DemoLine {
    private static final double FAULTY_SHARE = 0.2;

    private final URI service;
    private final Clock clock;
    private final PrintStream out;
    private final HttpClient client = HttpClient.newHttpClient();
    private final ObjectMapper json = new ObjectMapper();
    private final Map<String, Map<String, Integer>> table = new TreeMap<>();

    /** @param service address of a running service with the demo products, such as http://127.0.0.1:8080 */
    public DemoLine(URI service, Clock clock, PrintStream out) {
        this.service = service;
        this.clock = clock;
        this.out = out;
    }

    /**
     * Runs the line.
     *
     * @param parts     parts to post
     * @param perSecond rate; the line never goes faster, but slower when the service or the drawing of parts does
     * @param seed      of the parts; the measurement ids also carry the start time, so that every run is new
     */
    public void run(int parts, double perSecond, long seed) throws IOException, InterruptedException {
        Random random = new Random(seed);
        Map<DemoProduct, PartMaker> makers = new TreeMap<>((a, b) -> a.name().compareTo(b.name()));
        DemoProduct.ALL.forEach(d -> makers.put(d, new PartMaker(d, random.nextLong())));
        String run = OffsetDateTime.now(clock).format(DateTimeFormatter.ofPattern("yyyyMMdd-HHmmss", Locale.ROOT));
        long start = System.nanoTime();
        List<Double> millis = new ArrayList<>();
        for (int i = 1; i <= parts; i++) {
            DemoProduct demo = DemoProduct.ALL.get(random.nextInt(DemoProduct.ALL.size()));
            DemoFault fault = random.nextDouble() < FAULTY_SHARE ? fault(demo, random) : DemoFault.NONE;
            Measurement m = makers.get(demo).measure(String.format(Locale.ROOT, "demo-%s-%05d", run, i),
                    String.format(Locale.ROOT, "INV-%s-%05d", run, i), "invented-5", "demo1",
                    OffsetDateTime.now(clock).truncatedTo(ChronoUnit.MILLIS), fault);
            waitUntil(start + (long) (1e9 * (i - 1) / perSecond));
            long posted = System.nanoTime();
            JsonNode answer = post(m);
            millis.add((System.nanoTime() - posted) / 1e6);
            String truth = demo.name() + "  " + (fault.isNone() ? "healthy" : fault.region() + " fault");
            String verdict = answer.get("verdict").asText()
                    + (answer.hasNonNull("failingRegion") ? " " + answer.get("failingRegion").asText() : "");
            table.computeIfAbsent(truth, t -> new TreeMap<>()).merge(verdict, 1, Integer::sum);
            out.printf(Locale.ROOT, "\r%4d of %d parts, last: %s, truth %s, verdict %s%s", i, parts, demo.name(), fault,
                    verdict, " ".repeat(12));
            out.flush();
        }
        millis.sort(Double::compare);
        out.printf(Locale.ROOT, "%n%nTruth against verdict (invented parts; round trip median %.1f ms):%n",
                millis.get(millis.size() / 2));
        table.forEach((truth, verdicts) -> out.printf("  %-22s %s%n", truth, verdicts));
    }

    private static DemoFault fault(DemoProduct demo, Random random) {
        List<String> regions = demo == DemoProduct.HB40 ? List.of("attach", "solder", "tim") : List.of("attach");
        String region = regions.get(random.nextInt(regions.size()));
        DemoFault.Shape shape = DemoFault.Shape.values()[random.nextInt(3)];
        double severity = shape == DemoFault.Shape.THICK ? 0.5 + random.nextDouble() : 0.08 + 0.25 * random.nextDouble();
        return new DemoFault(region, shape, severity);
    }

    private static void waitUntil(long nanoTime) throws InterruptedException {
        long left = nanoTime - System.nanoTime();
        if (left > 0) {
            Thread.sleep(left / 1_000_000, (int) (left % 1_000_000));
        }
    }

    private JsonNode post(Measurement m) throws IOException, InterruptedException {
        byte[] body = CurveFile.write(new Submission(m.measurementId(), m.product(), m.serial(), m.lot(), m.station(),
                m.measuredAt().format(DateTimeFormatter.ISO_OFFSET_DATE_TIME), m.curveKind().word(),
                OptionalDouble.of(m.heatingPowerWatts()), OptionalDouble.of(m.heatingSeconds()), Optional.empty(), "", "",
                m.curve().timesSecondsUnsafe(), m.curve().valuesUnsafe(), Submission.TEMPERATURE_FIELD, 0));
        HttpRequest request = HttpRequest.newBuilder(service.resolve("/v1/transients"))
                .header("Content-Type", "text/csv").POST(HttpRequest.BodyPublishers.ofByteArray(body)).build();
        HttpResponse<byte[]> response = client.send(request, HttpResponse.BodyHandlers.ofByteArray());
        if (response.statusCode() != 200) {
            throw new IOException("the service answered " + response.statusCode() + ": "
                    + new String(response.body(), java.nio.charset.StandardCharsets.UTF_8));
        }
        return json.readTree(response.body());
    }
}
