package org.laddergate.measurement;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.charset.StandardCharsets;
import java.time.Clock;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;

class CurveFileTest {
    private static CurveFile read(String text) {
        return CurveFile.read(text.getBytes(StandardCharsets.UTF_8), 1000);
    }

    private static InputFault faultOf(String text) {
        return assertThrows(InvalidInputException.class, () -> read(text)).faults().get(0);
    }

    @Test
    void headerAndRows_areRead() {
        CurveFile file = read("""
                # condition: known-bad
                # faultRegion: attach
                # measurementId: g-1
                # product: hb40
                # serial: 24A7:0193
                # lot: L1
                # station: eol3
                # measuredAt: 2026-12-01T08:15:30.123+01:00
                # curve: cooling
                # heatingPowerWatts: 80.5
                # heatingSeconds: 4
                # note: measured twice, second one kept
                # operator: nobody
                # just words
                timeSeconds,temperatureCelsius
                1e-5,84.21
                2.5E-05, -3
                """);
        Submission s = file.submission();
        assertEquals("known-bad", s.condition());
        assertEquals("attach", s.faultRegion());
        assertEquals("g-1", s.measurementId());
        assertEquals("24A7:0193", s.serial());
        assertEquals(OptionalDouble.of(80.5), s.heatingPowerWatts());
        assertEquals(OptionalDouble.of(4), s.heatingSeconds());
        assertArrayEquals(new double[] {1e-5, 2.5e-5}, s.timesSeconds());
        assertArrayEquals(new double[] {84.21, -3}, s.values());
        assertEquals(List.of("line 13: header 'operator' is unknown and was ignored"), file.remarks());
    }

    @Test
    void spreadsheetHabits_areTolerated() {
        Submission s = read("\uFEFF\"# serial: a \"\"b\"\"\",\r\n# product: hb40,\r\n"
                + "\"timeSeconds\",\"voltageVolts\"\r\n\"0.001\",\"0.55\"\r\n0.002,0.56\r\n\r\n").submission();
        assertEquals("a \"b\"", s.serial());
        assertEquals("hb40", s.product());
        assertTrue(s.hasVoltages());
        assertArrayEquals(new double[] {0.55, 0.56}, s.values());
    }

    @Test
    void decimalComma_isRefusedByLine() {
        InputFault fault = faultOf("timeSeconds,temperatureCelsius\n0.001,25.0\n0,002;25,1\n");
        assertEquals("/temperatureCelsius/1", fault.pointer());
        assertTrue(fault.detail().startsWith("line 3: '0,002;25,1'"), fault.detail());
    }

    @Test
    void faultyRows_nameTheirLine() {
        assertTrue(faultOf("timeSeconds,temperatureCelsius\n1,x\n").detail().contains("line 2"));
        assertTrue(faultOf("timeSeconds,temperatureCelsius\n1,2,3\n").detail().contains("line 2"));
        assertTrue(faultOf("timeSeconds,temperatureCelsius\n1,2\n\n3,4\n").detail().contains("line 4"));
        assertTrue(faultOf("timeSeconds,temperatureCelsius\n1,NaN\n").detail().contains("line 2"));
        assertEquals("bad_columns", faultOf("time,temperature\n1,2\n").code());
        assertEquals("missing", faultOf("# serial: s\n").code());
        assertEquals("duplicate", faultOf("# serial: s\n# serial: s\ntimeSeconds,voltageVolts\n").code());
        assertEquals("/heatingPowerWatts", faultOf("# heatingPowerWatts: 8O\ntimeSeconds,voltageVolts\n").pointer());
    }

    @Test
    void rulesOnAFile_nameTheLineToo() {
        Submission s = read("# serial: s\ntimeSeconds,temperatureCelsius\n1,1\n2,1\n2,1\n4,1\n5,1\n6,1\n7,1\n8,1\n")
                .submission();
        InputFault fault = new CurveRules(100, Clock.systemUTC()).curveFaults(s).get(0);
        assertEquals("/timeSeconds/2", fault.pointer());
        assertTrue(fault.detail().startsWith("line 5: "), fault.detail());
    }

    @Test
    void written_isReadBackUnchanged() {
        Random random = new Random(7);
        Submission.Builder b = new Submission.Builder();
        b.text("measurementId", "m");
        b.text("serial", "\u90E8 \"x\", y");
        b.number("heatingSeconds", Double.POSITIVE_INFINITY);
        double[] t = new double[500];
        double[] v = new double[500];
        for (int i = 0; i < t.length; i++) {
            t[i] = (i + random.nextDouble()) * 1e-6;
            v[i] = random.nextGaussian() * Math.pow(10, random.nextInt(40) - 20);
        }
        Submission before = b.timesSeconds(t).values(Submission.VOLTAGE_FIELD, v).build();
        Submission after = CurveFile.read(CurveFile.write(before), 1000).submission();
        assertArrayEquals(t, after.timesSeconds());
        assertArrayEquals(v, after.values());
        assertEquals(before.serial(), after.serial());
        assertEquals(before.heatingSeconds(), after.heatingSeconds());
    }

    @Test
    void tooManyRows_areNotKept() {
        StringBuilder text = new StringBuilder("timeSeconds,temperatureCelsius\n");
        for (int i = 1; i <= 5000; i++) {
            text.append(i).append(",1\n");
        }
        assertEquals(1001, read(text.toString()).submission().timesSeconds().length);
    }

    /** The referee is the platform's own correctly rounded conversion. */
    @Test
    void everyNumber_isTheNearestDouble() {
        Random random = new Random(11);
        for (int i = 0; i < 200_000; i++) {
            int digits = 1 + random.nextInt(20);
            StringBuilder text = new StringBuilder(random.nextInt(3) == 0 ? "-" : "");
            int point = random.nextInt(digits + 1);
            for (int d = 0; d < digits; d++) {
                text.append(d == point ? "." : "").append((char) ('0' + random.nextInt(10)));
            }
            if (random.nextInt(2) == 0) {
                text.append(random.nextBoolean() ? 'e' : 'E').append(random.nextInt(700) - 350);
            }
            byte[] bytes = text.toString().getBytes(StandardCharsets.US_ASCII);
            assertEquals(Double.parseDouble(text.toString()), DecimalText.parse(bytes, 0, bytes.length), 0.0,
                    text::toString);
        }
    }

    @Test
    void whatIsNotADecimalNumber_isNaN() {
        for (String text : List.of("", "-", ".", "e5", "1e", "1e+", "1e12345", "0x10", "1f", "1d", "NaN", "Infinity",
                "1 2", "1,5", "--1", "1.2.3", "\u0661")) {
            byte[] bytes = text.getBytes(StandardCharsets.UTF_8);
            assertTrue(Double.isNaN(DecimalText.parse(bytes, 0, bytes.length)), text);
        }
    }
}
