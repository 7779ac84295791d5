package org.laddergate.http;

/** Ends a request with a problem. Has no stack trace: it is an answer, not a fault of ours. */
final class ProblemException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    private final transient Problem problem;

    ProblemException(Problem problem) {
        super(problem.detail(), null, false, false);
        this.problem = problem;
    }

    Problem problem() {
        return problem;
    }
}
