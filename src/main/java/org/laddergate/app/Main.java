package org.laddergate.app;

/** Main program. */
public final class Main {
    private Main() {}

    public static void main(String[] args) {
        System.exit(Commands.line(Wiring::new, System.getenv()).execute(args));
    }
}
