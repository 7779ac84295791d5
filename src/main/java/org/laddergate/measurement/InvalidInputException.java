package org.laddergate.measurement;

import java.util.List;
import java.util.stream.Collectors;

/** The input is malformed or impossible; nothing was done with it. */
public final class InvalidInputException extends RuntimeException {
    private static final long serialVersionUID = 1L;
    private final transient List<InputFault> faults;

    public InvalidInputException(List<InputFault> faults) {
        super(faults.stream().map(f -> f.pointer() + ": " + f.detail()).collect(Collectors.joining("; ")));
        this.faults = List.copyOf(faults);
    }

    public InvalidInputException(String pointer, String code, String detail) {
        this(List.of(new InputFault(pointer, code, detail)));
    }

    public List<InputFault> faults() {
        return faults;
    }
}
