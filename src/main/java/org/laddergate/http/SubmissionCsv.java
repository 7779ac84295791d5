package org.laddergate.http;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.laddergate.measurement.CurveFile;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Submission;

/** Reads one transient from CSV; what its header lines do not say may stand in the query. */
final class SubmissionCsv {
    private SubmissionCsv() {}

    /**
     * @param query first value of every query parameter
     * @throws InvalidInputException if rows cannot be read
     */
    static SubmissionJson.Parsed parse(byte[] body, Map<String, String> query, int maximumSamples) {
        CurveFile file = CurveFile.read(body, maximumSamples);
        List<InputFault> faults = new ArrayList<>();
        List<String> warnings = new ArrayList<>(file.remarks());
        Submission.Builder fields = file.submission().toBuilder();
        query.forEach((name, value) -> {
            if (Submission.TEXT_FIELDS.contains(name)) {
                text(file.submission(), fields, name, value, faults);
            } else if (name.equals("heatingPowerWatts") || name.equals("heatingSeconds")) {
                number(fields, name, value, faults);
            } else if (!name.equals("include")) {
                warnings.add("query parameter '" + name + "' is unknown and was ignored");
            }
        });
        return new SubmissionJson.Parsed(fields.build(), faults, warnings);
    }

    private static void text(Submission file, Submission.Builder fields, String name, String value,
            List<InputFault> faults) {
        String inFile = file.text(name);
        if (!inFile.isEmpty() && !inFile.equals(value)) {
            faults.add(new InputFault("/" + name, "both_given", name + " is '" + value + "' in the query and '" + inFile
                    + "' in the body"));
            return;
        }
        fields.text(name, value);
    }

    private static void number(Submission.Builder fields, String name, String value, List<InputFault> faults) {
        if (name.equals("heatingSeconds") && value.equals(Submission.STEADY_STATE)) {
            fields.number(name, Double.POSITIVE_INFINITY);
            return;
        }
        try {
            // Only plain decimal numbers, not the hexadecimal and suffixed forms of the platform.
            double number = value.matches("[-+0-9.eE]{1,100}") ? Double.parseDouble(value) : Double.NaN;
            fields.number(name, Double.isFinite(number) ? number : Double.NaN);
        } catch (NumberFormatException e) {
            faults.add(new InputFault("/" + name, "not_a_number", name + " '"
                    + (value.length() <= 40 ? value : value.substring(0, 40) + "...") + "' is not a number"));
        }
    }
}
