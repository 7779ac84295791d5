package org.laddergate.golden;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import org.junit.jupiter.api.Test;

class ToleranceTest {

    /** Source and tolerance: header of two-sided-factors.csv. */
    @Test
    void twoSidedFactor_exactReference_toOneInAMillion() throws IOException {
        int rows = 0;
        try (BufferedReader in = new BufferedReader(new InputStreamReader(
                ToleranceTest.class.getResourceAsStream("/reference/golden/two-sided-factors.csv"),
                StandardCharsets.UTF_8))) {
            for (String line : in.lines().filter(l -> !l.startsWith("#") && !l.startsWith("n,")).toList()) {
                String[] c = line.split(",");
                double factor = Tolerance.twoSidedFactor(Integer.parseInt(c[0]), Double.parseDouble(c[1]),
                        Double.parseDouble(c[2]));
                assertEquals(1, factor / Double.parseDouble(c[3]), 1e-6, line);
                rows++;
            }
        }
        assertEquals(54, rows);
    }

    /** NIST/SEMATECH e-Handbook 7.2.6.3 (n = 43, 0.90, 0.99): Howe's approximation is 2.2173, the exact factor 2.222825. */
    @Test
    void twoSidedFactor_handbookExample_exactNotApproximate() {
        assertEquals(2.222825, Tolerance.twoSidedFactor(43, 0.90, 0.99), 5e-7);
    }

    @Test
    void twoSidedFactor_moreUnits_narrower_moreContent_wider() {
        double last = Double.POSITIVE_INFINITY;
        for (int n = 10; n <= 300; n += 10) {
            double k = Tolerance.twoSidedFactor(n, 0.9975, 0.95);
            assertTrue(k < last, "n = " + n);
            assertTrue(Tolerance.twoSidedFactor(n, 0.9999, 0.95) > k);
            last = k;
        }
    }
}
