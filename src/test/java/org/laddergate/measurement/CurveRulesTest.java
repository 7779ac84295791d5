package org.laddergate.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Clock;
import java.time.Instant;
import java.time.OffsetDateTime;
import java.time.ZoneOffset;
import java.util.List;
import java.util.function.Consumer;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CurveRulesTest {
    private static final Instant NOW = Instant.parse("2026-12-01T08:00:00Z");
    private static final Recipe COOLING = Recipe.of(CurveKind.COOLING, 80, 4, 4e-5, 2);
    private final CurveRules rules = new CurveRules(20, Clock.fixed(NOW, ZoneOffset.UTC));

    static Submission.Builder good() {
        Submission.Builder b = new Submission.Builder();
        b.text("measurementId", "m1");
        b.text("product", "hb40");
        b.text("serial", "s1");
        return b.timesSeconds(new double[] {1e-5, 2e-5, 4e-5, 8e-5, 1e-3, 1e-2, 1e-1, 1})
                .values(Submission.TEMPERATURE_FIELD, new double[] {90, 89, 88, 87, 80, 70, 50, 25});
    }

    private List<InputFault> faultsOf(Consumer<Submission.Builder> change) {
        Submission.Builder b = good();
        change.accept(b);
        return rules.faults(b.build());
    }

    private void assertOne(String pointer, String code, String inDetail, Consumer<Submission.Builder> change) {
        List<InputFault> faults = faultsOf(change);
        assertEquals(1, faults.size(), faults.toString());
        assertEquals(pointer, faults.get(0).pointer());
        assertEquals(code, faults.get(0).code());
        assertTrue(faults.get(0).detail().contains(inDetail), faults.get(0).detail());
    }

    private static double[] goodTimesWith(int index, double value) {
        double[] t = good().build().timesSeconds();
        t[index] = value;
        return t;
    }

    private static double[] goodValuesWith(int index, double value) {
        double[] v = good().build().values();
        v[index] = value;
        return v;
    }

    @Test
    void goodCurve_recipeFillsWhatIsNotSaid() {
        Measurement m = rules.measurement(good().build(), COOLING);
        assertEquals(CurveKind.COOLING, m.curveKind());
        assertEquals(80, m.heatingPowerWatts());
        assertEquals(4, m.heatingSeconds());
        assertEquals(OffsetDateTime.ofInstant(NOW, ZoneOffset.UTC), m.measuredAt());
        assertEquals(8, m.curve().size());
    }

    @Test
    void whatIsSaid_winsOverTheRecipe() {
        Submission.Builder b = good();
        b.number("heatingPowerWatts", 79.5);
        b.number("heatingSeconds", Double.POSITIVE_INFINITY);
        b.text("measuredAt", "2026-12-01T08:15:30.123+01:00");
        Measurement m = rules.measurement(b.build(), COOLING);
        assertEquals(79.5, m.heatingPowerWatts());
        assertEquals(Double.POSITIVE_INFINITY, m.heatingSeconds());
        assertEquals("2026-12-01T08:15:30.123+01:00", m.measuredAt().toString());
    }

    @Test
    void heatingCurve_needsNoHeatingTime() {
        Submission.Builder b = good();
        b.text("curve", "heating");
        assertEquals(Double.POSITIVE_INFINITY, rules.measurement(b.build(), COOLING).heatingSeconds());
    }

    @Test
    void voltages_becomeTemperaturesByThePartsOwnSensorFirst() {
        double[] volts = {0.5, 0.51, 0.52, 0.53, 0.54, 0.55, 0.56, 0.6};
        Submission sent = good().values(Submission.VOLTAGE_FIELD, volts)
                .sensor(TemperatureSensor.linear(-500, 325)).build();
        Recipe recipe = new Recipe(CurveKind.COOLING, 80, 4, 4e-5, 2, 0.05, Double.NaN,
                java.util.Optional.of(TemperatureSensor.linear(-400, 300)));
        assertEquals(75, rules.measurement(sent, recipe).curve().value(0), 1e-12);
        Submission common = good().values(Submission.VOLTAGE_FIELD, volts).build();
        assertEquals(100, rules.measurement(common, recipe).curve().value(0), 1e-12);
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> rules.measurement(common, COOLING));
        assertEquals("no_sensor", e.faults().get(0).code());
    }

    @Test
    void openSensorAtARail_isAccepted() {
        double[] rail = new double[8];
        java.util.Arrays.fill(rail, -250);
        assertEquals(List.of(), faultsOf(b -> b.values(Submission.TEMPERATURE_FIELD, rail)));
        double[] openInput = new double[8];
        java.util.Arrays.fill(openInput, 5);
        Submission sent = good().values(Submission.VOLTAGE_FIELD, openInput)
                .sensor(TemperatureSensor.linear(-400, 300)).build();
        assertEquals(-1700, rules.measurement(sent, COOLING).curve().value(0), 1e-9);
    }

    @ParameterizedTest
    @CsvSource({"NaN, not_finite", "Infinity, not_finite", "-Infinity, not_finite", "-273.2, out_of_range",
        "2000.5, out_of_range"})
    void impossibleTemperature_isRefused(double celsius, String code) {
        assertOne("/temperatureCelsius/5", code, Double.toString(celsius),
                b -> b.values(Submission.TEMPERATURE_FIELD, goodValuesWith(5, celsius)));
    }

    @Test
    void impossibleTimes_areRefused() {
        assertOne("/timeSeconds/3", "not_increasing", "is 4.0E-5 after 4.0E-5",
                b -> b.timesSeconds(goodTimesWith(3, 4e-5)));
        assertOne("/timeSeconds/0", "not_positive", "0.0", b -> b.timesSeconds(goodTimesWith(0, 0)));
        assertOne("/timeSeconds/7", "out_of_range", "100000.1", b -> b.timesSeconds(goodTimesWith(7, 100000.1)));
        assertOne("/timeSeconds/4", "not_finite", "NaN", b -> b.timesSeconds(goodTimesWith(4, Double.NaN)));
    }

    @Test
    void numberOfSamples_isBounded() {
        List<InputFault> faults = faultsOf(b -> b.values(Submission.TEMPERATURE_FIELD, new double[7]));
        assertEquals(List.of("length_differs", "too_few_samples"), faults.stream().map(InputFault::code).toList());
        assertTrue(faults.get(0).detail().contains("7 samples and timeSeconds has 8"), faults.get(0).detail());
        assertEquals(2, faultsOf(b -> b.timesSeconds(new double[0]).values(Submission.TEMPERATURE_FIELD,
                new double[0])).stream().filter(f -> f.code().equals("empty")).count());
        double[] many = java.util.stream.IntStream.rangeClosed(1, 21).asDoubleStream().toArray();
        assertEquals(2, faultsOf(b -> b.timesSeconds(many).values(Submission.TEMPERATURE_FIELD, many)).stream()
                .filter(f -> f.code().equals("too_many_samples")).count());
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, 1.1e6, Double.NaN, Double.POSITIVE_INFINITY})
    void impossiblePower_isRefused(double watts) {
        assertOne("/heatingPowerWatts", "out_of_range", Double.toString(watts),
                b -> b.number("heatingPowerWatts", watts));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -4, Double.NaN})
    void impossibleHeatingTime_isRefused(double seconds) {
        assertOne("/heatingSeconds", "out_of_range", Double.toString(seconds),
                b -> b.number("heatingSeconds", seconds));
    }

    @Test
    void texts_areBoundedAndPrintable() {
        assertOne("/serial", "missing", "serial", b -> b.text("serial", " "));
        assertOne("/lot", "too_long", "129", b -> b.text("lot", "x".repeat(129)));
        assertOne("/station", "bad_character", "U+0007", b -> b.text("station", "a\u0007"));
        assertOne("/serial", "bad_character", "U+D800", b -> b.text("serial", "a\uD800b"));
        assertEquals(List.of(), faultsOf(b -> b.text("serial", "\u90E8\u54C1\uD83D\uDD25")));
        assertOne("/curve", "unknown_word", "'warming'", b -> b.text("curve", "warming"));
    }

    @ParameterizedTest
    @ValueSource(strings = {"yesterday", "2026-12-01", "2026-12-01T07:00:00", "2026-12-01T07:00+01:00",
        "+12026-12-01T07:00:00Z", "1969-12-31T23:59:59Z", "2026-13-01T07:00:00Z"})
    void notRfc3339_isRefused(String text) {
        assertOne("/measuredAt", "not_a_time", text, b -> b.text("measuredAt", text));
    }

    @Test
    void testersClock_mayBeAheadByFiveMinutesButNotMore() {
        assertEquals(List.of(), faultsOf(b -> b.text("measuredAt", "2026-12-01T08:05:00Z")));
        assertOne("/measuredAt", "in_the_future", "2026-12-01T08:05:01Z",
                b -> b.text("measuredAt", "2026-12-01T08:05:01Z"));
    }

    @Test
    void allFaults_areListedAtOnce() {
        List<InputFault> faults = faultsOf(b -> {
            b.text("serial", "");
            b.number("heatingPowerWatts", -1);
            b.timesSeconds(goodTimesWith(3, 0));
            b.values(Submission.TEMPERATURE_FIELD, goodValuesWith(1, 5000));
        });
        assertEquals(List.of("/serial", "/heatingPowerWatts", "/timeSeconds/3", "/temperatureCelsius/1"),
                faults.stream().map(InputFault::pointer).toList());
    }
}
