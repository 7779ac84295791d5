package org.laddergate.demo;

import java.nio.file.Path;
import java.time.Clock;
import java.time.OffsetDateTime;
import java.util.List;
import java.util.Locale;
import org.laddergate.golden.GoldenFolder;
import org.laddergate.golden.GoldenLearner;
import org.laddergate.golden.GoldenUnit;
import org.laddergate.golden.GoldenUnit.Condition;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.files.LimitFiles;
import org.laddergate.limits.files.ProductFiles;
import org.laddergate.measurement.CurveRules;

/** Makes the golden and known-bad units of the invented products and their first released limits. */
public final class DemoFolders {
    private static final int GOLDEN = 60;
    private static final long SEED = 20_261_201L;
    private static final OffsetDateTime START = OffsetDateTime.parse("2026-11-23T08:00:00+01:00");

    private DemoFolders() {}

    /** Writes the folders; files that are there already must be the same. */
    public static void write(Path goldenUnits, Path limits, Clock clock) {
        ProductFiles products = new ProductFiles(limits);
        LimitFiles limitFiles = new LimitFiles(limits, clock);
        for (DemoProduct demo : DemoProduct.ALL) {
            products.save(demo.product());
            GoldenFolder folder = new GoldenFolder(goldenUnits, products,
                    new CurveRules(CurveRules.DEFAULT_MAXIMUM_SAMPLES, clock));
            units(demo, folder);
            LimitSet draft = limitFiles.saveDraft(
                    new GoldenLearner(clock).learn(demo.product(), folder.units(demo.name())));
            limitFiles.release(demo.name(), draft.revision(), "demo", "first limits of an invented product");
        }
    }

    private static void units(DemoProduct demo, GoldenFolder folder) {
        PartMaker maker = new PartMaker(demo, SEED + demo.name().hashCode());
        for (int i = 1; i <= GOLDEN; i++) {
            String serial = String.format(Locale.ROOT, "INV-%s-G%03d", demo.name().toUpperCase(Locale.ROOT), i);
            String lot = "invented-" + (1 + (i - 1) / 20);
            folder.add(new GoldenUnit(maker.measure("golden-" + demo.name() + "-" + String.format("%03d", i), serial, lot,
                    "demo1", START.plusMinutes(3L * i), DemoFault.NONE), Condition.GOLDEN, ""));
        }
        int i = 0;
        for (DemoFault fault : knownBad(demo)) {
            i++;
            String id = String.format(Locale.ROOT, "known-bad-%s-%02d", demo.name(), i);
            String serial = String.format(Locale.ROOT, "INV-%s-B%02d", demo.name().toUpperCase(Locale.ROOT), i);
            folder.add(new GoldenUnit(maker.measure(id, serial, "invented-4", "demo1", START.plusHours(5).plusMinutes(i),
                    fault), Condition.KNOWN_BAD, fault.region()));
        }
    }

    private static List<DemoFault> knownBad(DemoProduct demo) {
        return demo == DemoProduct.HB40
                ? List.of(new DemoFault("attach", DemoFault.Shape.CENTRE_VOID, 0.15),
                        new DemoFault("attach", DemoFault.Shape.EDGE_DELAMINATION, 0.20),
                        new DemoFault("attach", DemoFault.Shape.THICK, 0.8),
                        new DemoFault("solder", DemoFault.Shape.CENTRE_VOID, 0.15),
                        new DemoFault("solder", DemoFault.Shape.EDGE_DELAMINATION, 0.30),
                        new DemoFault("tim", DemoFault.Shape.THICK, 0.9),
                        new DemoFault("tim", DemoFault.Shape.CENTRE_VOID, 0.25))
                : List.of(new DemoFault("attach", DemoFault.Shape.CENTRE_VOID, 0.10),
                        new DemoFault("attach", DemoFault.Shape.CENTRE_VOID, 0.30),
                        new DemoFault("attach", DemoFault.Shape.EDGE_DELAMINATION, 0.20),
                        new DemoFault("attach", DemoFault.Shape.THICK, 1.0),
                        new DemoFault("die", DemoFault.Shape.THICK, 0.25));
    }
}
