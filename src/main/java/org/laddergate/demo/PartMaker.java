package org.laddergate.demo;

import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.laddergate.limits.Layer;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.SampledCurve;
import org.laddergate.thermal.AxisymmetricStack;
import org.laddergate.thermal.StackSlab;

/**
 * Draws invented parts of a product and what a tester would record of them: conduction in two dimensions, spread from
 * part to part, noise, the switching transient of the first microseconds and a slow drift of the cold plate.
 *
 * <p>Deterministic for a seed. Not thread-safe.
 */
final class PartMaker {
    private static final double SAMPLE_SECONDS = 1e-6;
    private static final double FIRST_SECONDS = 1e-5;
    private static final int BINS_PER_DECADE = 25;
    private static final double AVERAGED_AT_MOST = 1000;
    private static final double TRANSIENT_KELVIN = 1.5;
    private static final double TRANSIENT_SECONDS = 6e-6;
    private static final double DRIFT_KELVIN = 0.03;
    private static final double PLATE_CELSIUS = 25;
    private static final double SPREAD_CUT = 3;

    private final DemoProduct demo;
    private final Random random;
    private final double[] times;
    private final double[] noise;

    PartMaker(DemoProduct demo, long seed) {
        this.demo = demo;
        this.random = new Random(seed);
        double record = demo.product().recipe().recordSeconds();
        List<Double> stamps = new ArrayList<>();
        List<Double> sigmas = new ArrayList<>();
        int bins = (int) Math.floor(BINS_PER_DECADE * Math.log10(record / FIRST_SECONDS));
        for (int i = 0; i < bins; i++) {
            long first = (long) Math.ceil(edge(i) / SAMPLE_SECONDS - 1e-9);
            long last = (long) Math.ceil(edge(i + 1) / SAMPLE_SECONDS - 1e-9) - 1;
            if (last >= first) {
                // Printed with few digits, since a file is read by people.
                stamps.add(Double.valueOf(String.format(Locale.ROOT, "%.6e", 0.5 * (first + last) * SAMPLE_SECONDS)));
                sigmas.add(Math.max(demo.noiseKelvin() / Math.sqrt(Math.min(last - first + 1, AVERAGED_AT_MOST)),
                        demo.noiseFloorKelvin()));
            }
        }
        this.times = stamps.stream().mapToDouble(Double::doubleValue).toArray();
        this.noise = sigmas.stream().mapToDouble(Double::doubleValue).toArray();
    }

    private static double edge(int i) {
        return FIRST_SECONDS * Math.pow(10, (double) i / BINS_PER_DECADE);
    }

    /** Draws a part with a given fault and measures it. */
    Measurement measure(String measurementId, String serial, String lot, String station, OffsetDateTime measuredAt,
            DemoFault fault) {
        Recipe recipe = demo.product().recipe();
        double[] celsius = new double[times.length];
        AxisymmetricStack part = part(fault);
        part.network().coolingInto(recipe.heatingPowerWatts(), recipe.heatingSeconds(), times, celsius);
        double transientSize = TRANSIENT_KELVIN * (1 + 0.15 * random.nextGaussian());
        double drift = DRIFT_KELVIN * (2 * random.nextDouble() - 1);
        double plate = PLATE_CELSIUS + 0.3 * random.nextGaussian();
        for (int i = 0; i < times.length; i++) {
            double t = times[i];
            celsius[i] += plate + drift * t / recipe.recordSeconds() + transientSize * Math.exp(-t / TRANSIENT_SECONDS)
                    + noise[i] * random.nextGaussian();
            celsius[i] = Math.round(celsius[i] * 1e4) / 1e4;
        }
        return new Measurement(measurementId, demo.name(), serial, lot, station, measuredAt, CurveKind.COOLING,
                recipe.heatingPowerWatts(), recipe.heatingSeconds(), SampledCurve.copyOf(times, celsius));
    }

    private AxisymmetricStack part(DemoFault fault) {
        List<StackSlab> slabs = new ArrayList<>();
        List<AxisymmetricStack.Void> voids = new ArrayList<>();
        List<Layer> layers = demo.product().layers();
        for (int i = 0; i < layers.size(); i++) {
            Layer layer = layers.get(i);
            double z = Math.max(-SPREAD_CUT, Math.min(SPREAD_CUT, random.nextGaussian()));
            double thickness = layer.thicknessMetres() * (1 + demo.thicknessSpread()[i] * z);
            double radius = Math.sqrt(layer.areaSquareMetres() / Math.PI);
            if (layer.region().equals(fault.region()) && !fault.isNone()) {
                switch (fault.shape()) {
                    case THICK -> thickness *= 1 + fault.severity();
                    case CENTRE_VOID ->
                        voids.add(new AxisymmetricStack.Void(i, 0, radius * Math.sqrt(fault.severity())));
                    case EDGE_DELAMINATION ->
                        voids.add(new AxisymmetricStack.Void(i, radius * Math.sqrt(1 - fault.severity()), radius));
                }
            }
            slabs.add(new StackSlab(thickness, radius,
                    layer.conductivityWattsPerMetreKelvin() * demo.conductivityTruth()[i],
                    layer.heatCapacityJoulesPerCubicMetreKelvin()));
        }
        double heated = slabs.get(0).radiusMetres() * Math.sqrt(demo.heatedShare());
        return AxisymmetricStack.of(slabs, heated, demo.film(), voids);
    }
}
