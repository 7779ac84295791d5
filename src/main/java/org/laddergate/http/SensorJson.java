package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.TemperatureSensor;

/** Sensor calibration on the wire: a K factor with its offset, or a polynomial. */
final class SensorJson {
    private static final String FACTOR = "kFactorKelvinPerVolt";
    private static final String OFFSET = "celsiusAtZeroVolts";
    private static final String POLYNOMIAL = "polynomialCelsius";

    private SensorJson() {}

    static Optional<TemperatureSensor> read(JsonNode node, String pointer, List<InputFault> faults) {
        int before = faults.size();
        JsonFields fields = new JsonFields(node, pointer, faults);
        boolean polynomial = fields.has(POLYNOMIAL);
        boolean linear = fields.has(FACTOR) | fields.has(OFFSET);
        if (node.isObject() && polynomial == linear) {
            fields.fault("", "ambiguous", "give either " + POLYNOMIAL + " or " + FACTOR + " with " + OFFSET);
        }
        double factor = linear ? fields.requiredNumber(FACTOR) : Double.NaN;
        double offset = linear ? fields.requiredNumber(OFFSET) : Double.NaN;
        List<Double> coefficients = fields.elements(POLYNOMIAL, (element, at) -> coefficient(element, at, faults));
        fields.refuseUnknown();
        if (faults.size() > before) {
            return Optional.empty();
        }
        try {
            return Optional.of(linear ? TemperatureSensor.linear(factor, offset)
                    : TemperatureSensor.polynomial(coefficients.stream().mapToDouble(c -> c).toArray()));
        } catch (IllegalArgumentException e) {
            fields.fault("", "out_of_range", e.getMessage());
            return Optional.empty();
        }
    }

    static void write(JsonGenerator g, TemperatureSensor sensor) throws IOException {
        double[] c = sensor.coefficients();
        g.writeObjectFieldStart("sensor");
        if (c.length == 2) {
            Json.number(g, FACTOR, c[1]);
            Json.number(g, OFFSET, c[0]);
        } else {
            Json.numbers(g, POLYNOMIAL, c);
        }
        g.writeEndObject();
    }

    private static Optional<Double> coefficient(JsonNode element, String pointer, List<InputFault> faults) {
        if (element.isNumber() && Double.isFinite(element.doubleValue())) {
            return Optional.of(element.doubleValue());
        }
        faults.add(new InputFault(pointer, "not_a_number", "a sensor coefficient must be a finite number"));
        return Optional.empty();
    }
}
