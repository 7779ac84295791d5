package org.laddergate.http;

import com.fasterxml.jackson.databind.JsonNode;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.BiFunction;
import java.util.function.Function;
import org.laddergate.measurement.InputFault;

/**
 * Reads the fields of one JSON object and notes every fault with its pointer. Fields that nobody asked for are faults:
 * on definitions a misspelt field must not be ignored.
 */
final class JsonFields {
    private static final int MAXIMUM_TEXT = 128;

    private final JsonNode node;
    private final String pointer;
    private final List<InputFault> faults;
    private final Set<String> known = new HashSet<>();

    JsonFields(JsonNode node, String pointer, List<InputFault> faults) {
        this.node = node;
        this.pointer = pointer;
        this.faults = faults;
        if (!node.isObject()) {
            faults.add(new InputFault(pointer, "wrong_type", name() + " must be an object"));
        }
    }

    private String name() {
        return pointer.isEmpty() ? "the body" : pointer.substring(1).replace('/', '.');
    }

    boolean has(String field) {
        known.add(field);
        return node.hasNonNull(field);
    }

    JsonNode get(String field) {
        known.add(field);
        return node.path(field);
    }

    String pointerTo(String field) {
        return pointer + "/" + field.replace("~", "~0").replace("/", "~1");
    }

    void fault(String field, String code, String detail) {
        faults.add(new InputFault(field.isEmpty() ? pointer : pointerTo(field), code, detail));
    }

    /** A text; empty and noted as a fault if it is missing or no text. */
    String requiredText(String field) {
        if (!has(field)) {
            fault(field, "missing", field + " is missing");
            return "";
        }
        String text = optionalText(field);
        if (text.isBlank() && get(field).isTextual()) {
            fault(field, "missing", field + " is empty");
        }
        return text;
    }

    /** A text; empty if it is not given. */
    String optionalText(String field) {
        return optionalText(field, MAXIMUM_TEXT);
    }

    String optionalText(String field, int maximumLength) {
        if (!has(field)) {
            return "";
        }
        JsonNode value = get(field);
        if (!value.isTextual()) {
            fault(field, "wrong_type", field + " must be a text");
            return "";
        }
        String text = value.textValue();
        if (text.length() > maximumLength) {
            fault(field, "too_long", field + " has " + text.length() + " characters; at most " + maximumLength
                    + " are accepted");
            return "";
        }
        if (text.codePoints().anyMatch(c -> Character.isISOControl(c) || c >= 0xD800 && c <= 0xDFFF)) {
            fault(field, "bad_character", field + " contains a character that is not allowed in text");
            return "";
        }
        return text;
    }

    /** One of the words of an enum. */
    <E> Optional<E> word(String field, E[] values, Function<E, String> word, String otherwise) {
        String text = has(field) ? optionalText(field) : otherwise;
        for (E value : values) {
            if (word.apply(value).equals(text)) {
                return Optional.of(value);
            }
        }
        List<String> words = Arrays.stream(values).map(word).toList();
        if (!has(field)) {
            fault(field, "missing", field + " is missing; it is one of " + words);
        } else if (get(field).isTextual()) {
            fault(field, "unknown_word", field + " is '" + text + "'; it must be one of " + words);
        }
        return Optional.empty();
    }

    /** A number; NaN and noted as a fault if it is missing or no number. */
    double requiredNumber(String field) {
        if (!has(field)) {
            fault(field, "missing", field + " is missing");
            return Double.NaN;
        }
        return optionalNumber(field, Double.NaN);
    }

    double optionalNumber(String field, double otherwise) {
        if (!has(field)) {
            return otherwise;
        }
        JsonNode value = get(field);
        double number = value.doubleValue();
        if (!value.isNumber()) {
            fault(field, "wrong_type", field + " must be a number");
            return Double.NaN;
        }
        if (!Double.isFinite(number)) {
            fault(field, "not_finite", field + " is " + number);
            return Double.NaN;
        }
        return number;
    }

    boolean isFaulty(String field) {
        String at = pointerTo(field);
        return faults.stream().anyMatch(fault -> fault.pointer().equals(at));
    }

    /**
     * Builds a validated value from numbers. When its constructor refuses one, the fault is noted under the field it
     * names and a harmless number takes its place, so that the next fault comes to light too.
     *
     * @param numbers   numbers by field name, modified
     * @param harmless  a number for every field that the constructor always accepts
     */
    <T> Optional<T> build(Map<String, Double> numbers, Map<String, Double> harmless,
            Function<Map<String, Double>, T> constructor) {
        numbers.replaceAll((field, value) -> isFaulty(field) ? harmless.get(field) : value);
        boolean sound = true;
        for (int attempt = 0; attempt <= numbers.size(); attempt++) {
            try {
                T value = constructor.apply(numbers);
                return sound ? Optional.of(value) : Optional.empty();
            } catch (IllegalArgumentException e) {
                sound = false;
                String field = e.getMessage().split(" ", 2)[0];
                boolean named = numbers.containsKey(field);
                fault(named ? field : "", "out_of_range", e.getMessage());
                if (!named) {
                    return Optional.empty();
                }
                numbers.put(field, harmless.get(field));
            }
        }
        return Optional.empty();
    }

    /** Elements of an array, each with its pointer as the second argument; empty if the field is not given. */
    <T> List<T> elements(String field, BiFunction<JsonNode, String, Optional<T>> reader) {
        List<T> read = new ArrayList<>();
        if (has(field) && !get(field).isArray()) {
            fault(field, "wrong_type", field + " must be an array");
        }
        int index = 0;
        for (JsonNode element : get(field).isArray() ? get(field) : List.<JsonNode>of()) {
            reader.apply(element, pointerTo(field) + "/" + index++).ifPresent(read::add);
        }
        return read;
    }

    /** Notes every field that was not asked for. Call last. */
    void refuseUnknown() {
        node.fieldNames().forEachRemaining(field -> {
            if (!known.contains(field)) {
                fault(field, "unknown_field", "there is no field '" + (field.length() <= 40 ? field
                        : field.substring(0, 40) + "...") + "' here");
            }
        });
    }
}
