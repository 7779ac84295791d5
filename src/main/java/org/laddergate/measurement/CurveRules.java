package org.laddergate.measurement;

import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.OffsetDateTime;
import java.time.ZoneOffset;
import java.time.format.DateTimeFormatter;
import java.time.format.DateTimeParseException;
import java.util.ArrayList;
import java.util.List;

/**
 * What a transient must satisfy before anything is done with it. Only the impossible is refused here: a curve of an
 * open sensor at a rail of -250 deg C is possible, is accepted, and is later judged not to be believed.
 *
 * <p>All faults are reported at once, except that at most one fault of each kind is reported per curve.
 *
 * <p>Safe for use from many threads.
 */
public final class CurveRules {
    /** Fewer samples carry no thermal information (common practice, no source). */
    public static final int MINIMUM_SAMPLES = 8;
    public static final int DEFAULT_MAXIMUM_SAMPLES = 1_000_000;
    /** Longer than a day of recording is a wrong unit. */
    public static final double MAXIMUM_TIME_SECONDS = 1e5;
    public static final double ABSOLUTE_ZERO_CELSIUS = -273.15;
    public static final double MAXIMUM_CELSIUS = 2000;
    public static final double MAXIMUM_VOLTS = 1000;
    public static final double MAXIMUM_POWER_WATTS = 1e6;
    public static final int MAXIMUM_TEXT_LENGTH = 128;
    /** A tester's clock may be ahead by this much. */
    public static final Duration MAXIMUM_CLOCK_LEAD = Duration.ofMinutes(5);

    private static final Instant EARLIEST = Instant.parse("1970-01-01T00:00:00Z");

    private final int maximumSamples;
    private final Clock clock;

    /**
     * @param maximumSamples    longest accepted curve
     * @param clock             what "now" is
     */
    public CurveRules(int maximumSamples, Clock clock) {
        if (maximumSamples < MINIMUM_SAMPLES) {
            throw new IllegalArgumentException("at least " + MINIMUM_SAMPLES + " samples must be accepted, not "
                    + maximumSamples);
        }
        this.maximumSamples = maximumSamples;
        this.clock = clock;
    }

    public int maximumSamples() {
        return maximumSamples;
    }

    /** Everything wrong with a submission that can be told without knowing its product; empty if nothing is. */
    public List<InputFault> faults(Submission sent) {
        List<InputFault> faults = headerFaults(sent);
        faults.addAll(curveFaults(sent));
        return faults;
    }

    /** Faults of everything but the curve. */
    public List<InputFault> headerFaults(Submission sent) {
        List<InputFault> faults = new ArrayList<>();
        requiredText(faults, "measurementId", sent.measurementId());
        requiredText(faults, "product", sent.product());
        requiredText(faults, "serial", sent.serial());
        text(faults, "lot", sent.lot());
        text(faults, "station", sent.station());
        text(faults, "faultRegion", sent.faultRegion());
        measuredAt(faults, sent.measuredAt());
        if (!sent.curve().isEmpty() && kind(sent.curve(), null) == null) {
            faults.add(new InputFault("/curve", "unknown_word",
                    "curve is '" + shown(sent.curve()) + "'; it must be 'cooling' or 'heating'"));
        }
        sent.heatingPowerWatts().ifPresent(watts -> power(faults, watts));
        sent.heatingSeconds().ifPresent(seconds -> heatingTime(faults, seconds));
        return faults;
    }

    /** Faults of the curve alone. */
    public List<InputFault> curveFaults(Submission sent) {
        List<InputFault> faults = new ArrayList<>();
        if (!lengths(faults, sent)) {
            return faults;
        }
        times(faults, sent);
        values(faults, sent);
        return faults;
    }

    /**
     * Fills in what the product's recipe says and converts voltages to temperatures.
     *
     * @throws InvalidInputException naming every fault
     */
    public Measurement measurement(Submission sent, Recipe recipe) {
        List<InputFault> faults = faults(sent);
        if (sent.hasVoltages() && sent.sensor().isEmpty() && recipe.sensor().isEmpty()) {
            faults.add(new InputFault("/" + Submission.VOLTAGE_FIELD, "no_sensor",
                    "the curve is in volts, but neither the product nor this measurement has a sensor calibration"));
        }
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        CurveKind kind = kind(sent.curve(), recipe.curve());
        double heatingSeconds = kind == CurveKind.HEATING ? Double.POSITIVE_INFINITY
                : sent.heatingSeconds().orElse(recipe.heatingSeconds());
        return new Measurement(sent.measurementId(), sent.product(), sent.serial(), sent.lot(), sent.station(),
                measuredAt(sent.measuredAt()), kind, sent.heatingPowerWatts().orElse(recipe.heatingPowerWatts()),
                heatingSeconds, SampledCurve.ofUnsafe(sent.timesSeconds(), temperatures(sent, recipe)));
    }

    private OffsetDateTime measuredAt(String text) {
        return text.isEmpty() ? OffsetDateTime.ofInstant(clock.instant(), ZoneOffset.UTC)
                : OffsetDateTime.parse(text, DateTimeFormatter.ISO_OFFSET_DATE_TIME);
    }

    private static double[] temperatures(Submission sent, Recipe recipe) {
        if (!sent.hasVoltages()) {
            return sent.values();
        }
        TemperatureSensor sensor = sent.sensor().or(recipe::sensor).orElseThrow();
        double[] celsius = new double[sent.values().length];
        for (int i = 0; i < celsius.length; i++) {
            celsius[i] = sensor.temperatureCelsius(sent.values()[i]);
            // The bound on the voltage keeps this finite unless the calibration itself is absurd.
            if (!Double.isFinite(celsius[i])) {
                throw new InvalidInputException("/" + Submission.VOLTAGE_FIELD + "/" + i, "not_finite",
                        "the sensor calibration makes " + sent.values()[i] + " V a temperature that is not finite");
            }
        }
        return celsius;
    }

    private static CurveKind kind(String word, CurveKind otherwise) {
        for (CurveKind kind : CurveKind.values()) {
            if (kind.word().equals(word)) {
                return kind;
            }
        }
        return word.isEmpty() ? otherwise : null;
    }

    private static void requiredText(List<InputFault> faults, String field, String value) {
        if (value.isBlank()) {
            faults.add(new InputFault("/" + field, "missing", field + " is missing or empty"));
        } else {
            text(faults, field, value);
        }
    }

    private static void text(List<InputFault> faults, String field, String value) {
        if (value.length() > MAXIMUM_TEXT_LENGTH) {
            faults.add(new InputFault("/" + field, "too_long", field + " has " + value.length()
                    + " characters; at most " + MAXIMUM_TEXT_LENGTH + " are accepted"));
        }
        for (int i = 0; i < value.length(); i++) {
            char c = value.charAt(i);
            boolean paired = Character.isHighSurrogate(c) && i + 1 < value.length()
                    && Character.isLowSurrogate(value.charAt(i + 1));
            if (Character.isISOControl(c) || Character.isSurrogate(c) && !paired) {
                faults.add(new InputFault("/" + field, "bad_character", String.format(
                        "character %d of %s is U+%04X, which is not allowed in text", i, field, (int) c)));
                return;
            }
            i += paired ? 1 : 0;
        }
    }

    private void measuredAt(List<InputFault> faults, String text) {
        if (text.isEmpty()) {
            return;
        }
        try {
            Instant instant = measuredAt(text).toInstant();
            // java.time also reads years of more than four digits and times without seconds; RFC 3339 knows neither.
            if (text.length() < 20 || text.charAt(4) != '-' || text.charAt(16) != ':' || instant.isBefore(EARLIEST)) {
                faults.add(notATime(text));
            } else if (instant.isAfter(clock.instant().plus(MAXIMUM_CLOCK_LEAD))) {
                faults.add(new InputFault("/measuredAt", "in_the_future", "measuredAt " + text + " is more than "
                        + MAXIMUM_CLOCK_LEAD.toMinutes() + " minutes ahead of " + clock.instant()));
            }
        } catch (DateTimeParseException e) {
            faults.add(notATime(text));
        }
    }

    private static InputFault notATime(String text) {
        return new InputFault("/measuredAt", "not_a_time", "measuredAt '" + shown(text)
                + "' is not a time of RFC 3339 with an offset, such as 2026-12-01T08:15:30.123+01:00");
    }

    private static void power(List<InputFault> faults, double watts) {
        if (!(watts > 0 && watts <= MAXIMUM_POWER_WATTS)) {
            faults.add(new InputFault("/heatingPowerWatts", "out_of_range", "heatingPowerWatts is " + watts
                    + "; it must be above 0 and at most " + MAXIMUM_POWER_WATTS));
        }
    }

    private static void heatingTime(List<InputFault> faults, double seconds) {
        if (!(seconds > 0)) {
            faults.add(new InputFault("/heatingSeconds", "out_of_range",
                    "heatingSeconds is " + seconds + "; it must be above 0"));
        }
    }

    private boolean lengths(List<InputFault> faults, Submission sent) {
        int times = sent.timesSeconds().length;
        int values = sent.values().length;
        String valuePointer = "/" + sent.valueField();
        if (times != values) {
            faults.add(new InputFault(valuePointer, "length_differs", sent.valueField() + " has " + values
                    + " samples and " + Submission.TIME_FIELD + " has " + times));
        }
        boolean tooLong = size(faults, Submission.TIME_FIELD, times) | size(faults, sent.valueField(), values);
        return times == values && !tooLong;
    }

    /** Reports a wrong number of samples; returns whether there are too many to look at. */
    private boolean size(List<InputFault> faults, String field, int samples) {
        if (samples == 0) {
            faults.add(new InputFault("/" + field, "empty", field + " is missing or has no samples"));
        } else if (samples < MINIMUM_SAMPLES) {
            faults.add(new InputFault("/" + field, "too_few_samples",
                    field + " has " + samples + " samples; at least " + MINIMUM_SAMPLES + " are needed"));
        } else if (samples > maximumSamples) {
            faults.add(new InputFault("/" + field, "too_many_samples",
                    field + " has more than the " + maximumSamples + " samples that are accepted"));
            return true;
        }
        return false;
    }

    private static void times(List<InputFault> faults, Submission sent) {
        double[] t = sent.timesSeconds();
        for (int i = 0; i < t.length; i++) {
            if (!Double.isFinite(t[i])) {
                faults.add(sample(sent, Submission.TIME_FIELD, i, "not_finite", "is " + t[i]));
                return;
            }
            if (i == 0 && !(t[0] > 0)) {
                faults.add(sample(sent, Submission.TIME_FIELD, 0, "not_positive", "is " + t[0]
                        + "; the first time must be above 0, the moment of the power step"));
            } else if (i > 0 && !(t[i] > t[i - 1])) {
                faults.add(sample(sent, Submission.TIME_FIELD, i, "not_increasing", "is " + t[i]
                        + " after " + t[i - 1] + "; times must increase"));
                return;
            }
        }
        int last = t.length - 1;
        if (last >= 0 && t[last] > MAXIMUM_TIME_SECONDS) {
            faults.add(sample(sent, Submission.TIME_FIELD, last, "out_of_range",
                    "is " + t[last] + "; at most " + MAXIMUM_TIME_SECONDS + " s are accepted"));
        }
    }

    private static void values(List<InputFault> faults, Submission sent) {
        double[] v = sent.values();
        double lowest = sent.hasVoltages() ? -MAXIMUM_VOLTS : ABSOLUTE_ZERO_CELSIUS;
        double highest = sent.hasVoltages() ? MAXIMUM_VOLTS : MAXIMUM_CELSIUS;
        for (int i = 0; i < v.length; i++) {
            if (!(v[i] >= lowest && v[i] <= highest)) {
                boolean finite = Double.isFinite(v[i]);
                faults.add(sample(sent, sent.valueField(), i, finite ? "out_of_range" : "not_finite", "is " + v[i]
                        + (finite ? "; it must be between " + lowest + " and " + highest : "")));
                return;
            }
        }
    }

    private static InputFault sample(Submission sent, String field, int index, String code, String what) {
        String line = sent.firstLine() > 0 ? "line " + (sent.firstLine() + index) + ": " : "";
        return new InputFault("/" + field + "/" + index, code, line + field + "[" + index + "] " + what);
    }

    private static String shown(String text) {
        return text.length() <= 40 ? text : text.substring(0, 40) + "...";
    }
}
