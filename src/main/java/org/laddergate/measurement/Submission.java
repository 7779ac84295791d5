package org.laddergate.measurement;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * One transient exactly as somebody sent it or wrote it into a file: nothing checked, nothing filled in. Text fields
 * are empty and numbers absent when they were not given. {@link CurveRules} turns it into a {@link Measurement}.
 *
 * @param measurementId     the sender's name for the measurement
 * @param product           product name
 * @param serial            serial number
 * @param lot               production lot
 * @param station           test station
 * @param measuredAt        time as written
 * @param curve             "cooling" or "heating", as written
 * @param heatingPowerWatts power step [W]
 * @param heatingSeconds    pulse before a cooling curve [s]; infinite for the words "steady-state"
 * @param sensor            calibration of this part's sensor
 * @param condition         of a reference unit, as written
 * @param faultRegion       of a known-bad unit, as written
 * @param timesSeconds      sample times [s]; owned by this object, not to be modified
 * @param values            temperatures [deg C] or voltages [V]; owned by this object, not to be modified
 * @param valueField        {@link #TEMPERATURE_FIELD} or {@link #VOLTAGE_FIELD}
 * @param firstLine         line of the first sample if it came from a text file, else 0
 */
public record Submission(String measurementId, String product, String serial, String lot, String station,
        String measuredAt, String curve, OptionalDouble heatingPowerWatts, OptionalDouble heatingSeconds,
        Optional<TemperatureSensor> sensor, String condition, String faultRegion, double[] timesSeconds,
        double[] values, String valueField, int firstLine) {

    /** Names of the text fields on the wire and in file headers. */
    public static final List<String> TEXT_FIELDS = List.of("measurementId", "product", "serial", "lot", "station",
            "measuredAt", "curve", "condition", "faultRegion");
    public static final String TIME_FIELD = "timeSeconds";
    public static final String TEMPERATURE_FIELD = "temperatureCelsius";
    public static final String VOLTAGE_FIELD = "voltageVolts";
    /** Word for a heating pulse long enough that nothing changed any more; no JSON number can say infinite. */
    public static final String STEADY_STATE = "steady-state";

    /** Whether the values are sensor voltages. */
    public boolean hasVoltages() {
        return valueField.equals(VOLTAGE_FIELD);
    }

    /** A text field by its name on the wire; empty if it was not given or there is no such field. */
    public String text(String field) {
        return switch (field) {
            case "measurementId" -> measurementId;
            case "product" -> product;
            case "serial" -> serial;
            case "lot" -> lot;
            case "station" -> station;
            case "measuredAt" -> measuredAt;
            case "curve" -> curve;
            case "condition" -> condition;
            case "faultRegion" -> faultRegion;
            default -> "";
        };
    }

    /** A builder that starts from this submission; shares the arrays. */
    public Builder toBuilder() {
        Builder b = new Builder();
        TEXT_FIELDS.forEach(field -> b.text(field, text(field)));
        heatingPowerWatts.ifPresent(watts -> b.number("heatingPowerWatts", watts));
        heatingSeconds.ifPresent(seconds -> b.number("heatingSeconds", seconds));
        sensor.ifPresent(b::sensor);
        return b.timesSeconds(timesSeconds).values(valueField, values).firstLine(firstLine);
    }

    /** Collects the fields in whatever order they arrive; for one thread. */
    public static final class Builder {
        private String measurementId = "";
        private String product = "";
        private String serial = "";
        private String lot = "";
        private String station = "";
        private String measuredAt = "";
        private String curve = "";
        private OptionalDouble heatingPowerWatts = OptionalDouble.empty();
        private OptionalDouble heatingSeconds = OptionalDouble.empty();
        private Optional<TemperatureSensor> sensor = Optional.empty();
        private String condition = "";
        private String faultRegion = "";
        private double[] timesSeconds = new double[0];
        private double[] values = new double[0];
        private String valueField = TEMPERATURE_FIELD;
        private int firstLine;

        /** Sets a text field by its name on the wire; returns false if there is no such text field. */
        public boolean text(String field, String value) {
            switch (field) {
                case "measurementId" -> measurementId = value;
                case "product" -> product = value;
                case "serial" -> serial = value;
                case "lot" -> lot = value;
                case "station" -> station = value;
                case "measuredAt" -> measuredAt = value;
                case "curve" -> curve = value;
                case "condition" -> condition = value;
                case "faultRegion" -> faultRegion = value;
                default -> {
                    return false;
                }
            }
            return true;
        }

        /** Sets {@code heatingPowerWatts} or {@code heatingSeconds}; returns false if there is no such number field. */
        public boolean number(String field, double value) {
            switch (field) {
                case "heatingPowerWatts" -> heatingPowerWatts = OptionalDouble.of(value);
                case "heatingSeconds" -> heatingSeconds = OptionalDouble.of(value);
                default -> {
                    return false;
                }
            }
            return true;
        }

        public Builder sensor(TemperatureSensor calibration) {
            sensor = Optional.of(calibration);
            return this;
        }

        /** Takes the array over without copying. */
        public Builder timesSeconds(double[] times) {
            timesSeconds = times;
            return this;
        }

        /** Takes the array over without copying. */
        public Builder values(String field, double[] samples) {
            valueField = field;
            values = samples;
            return this;
        }

        public Builder firstLine(int line) {
            firstLine = line;
            return this;
        }

        public Submission build() {
            return new Submission(measurementId, product, serial, lot, station, measuredAt, curve, heatingPowerWatts,
                    heatingSeconds, sensor, condition, faultRegion, timesSeconds, values, valueField, firstLine);
        }
    }
}
