package org.laddergate.golden;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.net.URLEncoder;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.format.DateTimeFormatter;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import org.laddergate.golden.GoldenUnit.Condition;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.ProductStore;
import org.laddergate.limits.files.DurableFiles;
import org.laddergate.measurement.CurveFile;
import org.laddergate.measurement.CurveRules;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.Submission;

/**
 * Golden and known-bad units as curve files, {@code <golden-units>/<product>/<measurement id>.csv}. The folder is the
 * truth: files put there by hand count like posted ones, so it is read anew every time.
 */
public final class GoldenFolder implements GoldenStore {
    private static final String SUFFIX = ".csv";

    private final Path root;
    private final ProductStore products;
    private final CurveRules rules;

    public GoldenFolder(Path root, ProductStore products, CurveRules rules) {
        this.root = root;
        this.products = products;
        this.rules = rules;
    }

    @Override
    public List<GoldenUnit> units(String product) {
        Recipe recipe = recipe(product);
        Path folder = root.resolve(product);
        if (!Files.isDirectory(folder)) {
            return List.of();
        }
        List<InputFault> faults = new ArrayList<>();
        List<GoldenUnit> units = new ArrayList<>();
        for (Path file : files(folder)) {
            try {
                units.add(unit(file, product, recipe));
            } catch (InvalidInputException e) {
                e.faults().forEach(f -> faults.add(new InputFault("/goldenUnits/" + file.getFileName() + f.pointer(),
                        f.code(), "file " + file.getFileName() + ": " + f.detail())));
            }
        }
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        units.sort(Comparator.comparing(u -> u.measurement().measurementId()));
        return units;
    }

    @Override
    public synchronized boolean add(GoldenUnit unit) {
        Measurement m = unit.measurement();
        Path file = root.resolve(m.product()).resolve(fileName(m.measurementId()));
        String text = text(unit);
        if (Files.exists(file)) {
            if (DurableFiles.read(file).equals(text)) {
                return false;
            }
            throw new DuplicateGoldenUnitException(m.measurementId());
        }
        DurableFiles.write(file, text);
        return true;
    }

    private GoldenUnit unit(Path file, String product, Recipe recipe) {
        Submission sent = CurveFile.read(DurableFiles.read(file).getBytes(StandardCharsets.UTF_8),
                rules.maximumSamples()).submission();
        Measurement measurement = rules.measurement(sent, recipe);
        if (!measurement.product().equals(product)) {
            throw new InvalidInputException("/product", "other_product", "the file says product '"
                    + measurement.product() + "', its folder says '" + product + "'");
        }
        return new GoldenUnit(measurement, condition(sent.condition()), sent.faultRegion());
    }

    /** The condition of a word; a file without one is a golden unit's. */
    public static Condition condition(String word) {
        if (word.isEmpty()) {
            return Condition.GOLDEN;
        }
        for (Condition c : Condition.values()) {
            if (c.word().equals(word)) {
                return c;
            }
        }
        throw new InvalidInputException("/condition", "unknown_word",
                "condition is '" + word + "'; it must be 'golden' or 'known-bad'");
    }

    private Recipe recipe(String product) {
        return products.find(product).orElseThrow(() -> new LimitNotFoundException("unknown_product",
                "there is no product " + product)).recipe();
    }

    private static String text(GoldenUnit unit) {
        Measurement m = unit.measurement();
        return new String(CurveFile.write(new Submission(m.measurementId(), m.product(), m.serial(), m.lot(), m.station(),
                m.measuredAt().format(DateTimeFormatter.ISO_OFFSET_DATE_TIME), m.curveKind().word(),
                OptionalDouble.of(m.heatingPowerWatts()), OptionalDouble.of(m.heatingSeconds()), Optional.empty(),
                unit.condition().word(), unit.faultRegion(), m.curve().timesSecondsUnsafe(), m.curve().valuesUnsafe(),
                Submission.TEMPERATURE_FIELD, 0)), StandardCharsets.UTF_8);
    }

    private static String fileName(String measurementId) {
        return URLEncoder.encode(measurementId, StandardCharsets.UTF_8).replace("*", "%2A") + SUFFIX;
    }

    private static List<Path> files(Path folder) {
        try (Stream<Path> all = Files.list(folder)) {
            return all.filter(f -> f.getFileName().toString().endsWith(SUFFIX)).sorted().toList();
        } catch (IOException e) {
            throw new UncheckedIOException("cannot list " + folder, e);
        }
    }
}
