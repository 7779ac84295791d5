package org.laddergate.limits.files;

import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.laddergate.limits.Envelope;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.SpreadDirection;

/** The content of a limit set as text; its state is not part of it. */
final class LimitText {
    private LimitText() {}

    static String write(LimitSet set, int revision) {
        SectionText.Writer w = new SectionText.Writer().comment("Laddergate limit set, format 1")
                .comment("Once released this file is never edited: learn a new revision instead.")
                .value("product", set.product()).value("revision", revision).value("learnt_at", set.learntAt())
                .value("golden_units", set.goldenUnits());
        w.section("remarks").row("remark");
        set.remarks().forEach(w::row);
        ProductText.recipe(w, set.recipe());
        ProductText.settings(w, set.settings());
        w.section("region limits").comment("resistances in K/W, capacitances in J/K; factor: two-sided tolerance factor")
                .row("name", "role", "from_J_per_K", "to_J_per_K", "judged", "golden_mean", "golden_sigma",
                        "uncertainty", "factor", "lower", "upper", "origin");
        for (RegionLimit r : set.regionLimits()) {
            w.row(r.region().name(), r.region().role().word(), r.region().fromJoulesPerKelvin(),
                    r.region().toJoulesPerKelvin(), r.assessed(), r.goldenMeanKelvinPerWatt(),
                    r.goldenSigmaKelvinPerWatt(), r.uncertaintyKelvinPerWatt(), r.factor(), r.lowerKelvinPerWatt(),
                    r.upperKelvinPerWatt(), r.origin());
        }
        model(w, set.model());
        return w.toString();
    }

    private static void model(SectionText.Writer w, GoldenModel m) {
        w.section("golden family").value("first_edge_s", m.firstEdgeSeconds()).value("last_edge_s", m.lastEdgeSeconds())
                .value("bins_per_decade", m.binsPerDecade()).value("in_family_limit", m.inFamilyLimit())
                .value("shape_limit", m.shapeLimit()).value("family_bend", m.familyBend())
                .value("from_layers", m.fromLayers());
        w.section("envelope").row("capacitance_J_per_K", "lower_K_per_W", "upper_K_per_W");
        for (int i = 0; i < m.envelope().capacitancesJoulesPerKelvin().length; i++) {
            w.row(m.envelope().capacitancesJoulesPerKelvin()[i], m.envelope().lowerKelvinPerWatt()[i],
                    m.envelope().upperKelvinPerWatt()[i]);
        }
        w.section("golden curve").row("golden_K", "noise_K");
        for (int i = 0; i < m.goldenKelvin().length; i++) {
            w.row(m.goldenKelvin()[i], m.noiseKelvin()[i]);
        }
        w.section("golden network").row("resistance_K_per_W", "time_constant_s");
        for (int i = 0; i < m.networkResistances().length; i++) {
            w.row(m.networkResistances()[i], m.networkTimeConstants()[i]);
        }
        w.section("golden spectrum").row("amplitude_K_per_W");
        for (double a : m.spectrum()) {
            w.row(a);
        }
        vectors(w, "comparison noise", new double[][] {m.comparisonNoiseKelvin()});
        vectors(w, "family factors", m.familyFactors());
        w.section("fault signatures").comment("deviation from golden in comparison bins [K], separated by spaces")
                .row("region", "shape", "severity", "added_K_per_W", "deviation_K");
        for (FaultSignature s : m.signatures()) {
            w.row(s.region(), s.shape().word(), s.severity(), s.addedResistanceKelvinPerWatt(),
                    joined(s.deviationKelvin()));
        }
        spread(w, m.spread());
    }

    private static void spread(SectionText.Writer w, List<SpreadDirection> spread) {
        w.section("family spread").comment("how healthy parts differ: deviation for one unit in comparison bins [K]")
                .row("name", "region", "sigma", "deviation_K");
        spread.forEach(d -> w.row(d.name(), d.region(), d.sigma(), joined(d.deviationKelvin())));
    }

    private static List<SpreadDirection> spread(SectionText.Section s) {
        List<SpreadDirection> out = new ArrayList<>();
        for (int i = 0; i < s.rowCount(); i++) {
            out.add(new SpreadDirection(s.cell(i, "name"), s.cell(i, "region"), s.number(i, "sigma"),
                    split(s.cell(i, "deviation_K"))));
        }
        return out;
    }

    private static void vectors(SectionText.Writer w, String name, double[][] vectors) {
        w.section(name).row("values_K");
        for (double[] v : vectors) {
            w.row(joined(v));
        }
    }

    private static String joined(double[] values) {
        StringBuilder b = new StringBuilder();
        for (double v : values) {
            b.append(b.length() == 0 ? "" : " ").append(v);
        }
        return b.toString();
    }

    static LimitSet read(String text, LimitState state, String sha256) {
        Map<String, SectionText.Section> s = SectionText.read(text);
        SectionText.Section head = s.get("");
        SectionText.Section remarks = ProductText.section(s, "remarks");
        List<String> notes = new ArrayList<>();
        for (int i = 0; i < remarks.rowCount(); i++) {
            notes.add(remarks.cell(i, "remark"));
        }
        SectionText.Section r = ProductText.section(s, "region limits");
        List<RegionLimit> limits = new ArrayList<>();
        for (int i = 0; i < r.rowCount(); i++) {
            limits.add(new RegionLimit(
                    new Region(r.cell(i, "name"), ProductText.role(r.cell(i, "role")), r.number(i, "from_J_per_K"),
                            r.number(i, "to_J_per_K")),
                    Boolean.parseBoolean(r.cell(i, "judged")), r.number(i, "golden_mean"),
                    r.number(i, "golden_sigma"), r.number(i, "uncertainty"), r.number(i, "factor"),
                    r.number(i, "lower"), r.number(i, "upper"), r.cell(i, "origin")));
        }
        return new LimitSet(head.text("product"), (int) head.number("revision"), state, sha256,
                Instant.parse(head.text("learnt_at")), ProductText.recipe(ProductText.section(s, "recipe")),
                ProductText.settings(ProductText.section(s, "decision")), (int) head.number("golden_units"), limits,
                model(s), notes);
    }

    private static GoldenModel model(Map<String, SectionText.Section> s) {
        SectionText.Section family = ProductText.section(s, "golden family");
        SectionText.Section envelope = ProductText.section(s, "envelope");
        SectionText.Section curve = ProductText.section(s, "golden curve");
        SectionText.Section network = ProductText.section(s, "golden network");
        SectionText.Section faults = ProductText.section(s, "fault signatures");
        List<FaultSignature> signatures = new ArrayList<>();
        for (int i = 0; i < faults.rowCount(); i++) {
            signatures.add(new FaultSignature(faults.cell(i, "region"),
                    FaultSignature.Shape.valueOf(faults.cell(i, "shape").toUpperCase(Locale.ROOT)),
                    faults.number(i, "severity"), faults.number(i, "added_K_per_W"),
                    split(faults.cell(i, "deviation_K"))));
        }
        return new GoldenModel(family.number("first_edge_s"), family.number("last_edge_s"),
                (int) family.number("bins_per_decade"), curve.column("golden_K"), curve.column("noise_K"),
                vectors(s, "comparison noise")[0], vectors(s, "family factors"), family.number("family_bend"),
                family.number("in_family_limit"),
                family.number("shape_limit"), network.column("resistance_K_per_W"), network.column("time_constant_s"),
                signatures, spread(ProductText.section(s, "family spread")),
                Boolean.parseBoolean(family.text("from_layers")),
                ProductText.section(s, "golden spectrum").column("amplitude_K_per_W"),
                new Envelope(envelope.column("capacitance_J_per_K"), envelope.column("lower_K_per_W"),
                        envelope.column("upper_K_per_W")));
    }

    private static double[][] vectors(Map<String, SectionText.Section> s, String name) {
        SectionText.Section section = ProductText.section(s, name);
        double[][] out = new double[section.rowCount()][];
        for (int i = 0; i < out.length; i++) {
            out[i] = split(section.cell(i, "values_K"));
        }
        return out;
    }

    private static double[] split(String text) {
        String[] parts = text.split(" ");
        double[] out = new double[parts.length];
        for (int i = 0; i < out.length; i++) {
            out[i] = Double.parseDouble(parts[i]);
        }
        return out;
    }
}
