package org.laddergate.app;

import java.io.PrintWriter;
import java.security.SecureRandom;
import java.util.Base64;
import java.util.concurrent.Callable;
import org.laddergate.http.Tokens;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Makes a token. */
@Command(name = "token", mixinStandardHelpOptions = true,
        description = "Make a token: print it once, and the line for the token file, which holds only its hash.")
final class TokenCommand implements Callable<Integer> {
    private static final int BYTES = 32;

    @Spec
    private CommandSpec spec;
    @Parameters(index = "0", paramLabel = "<role>", description = "TESTER, ENGINEER or MES")
    private Tokens.Role role;
    @Parameters(index = "1", paramLabel = "<name>", description = "who gets it; one word")
    private String name;

    @Override
    public Integer call() {
        if (!name.matches("[A-Za-z0-9][A-Za-z0-9._-]{0,63}")) {
            throw new IllegalArgumentException("the name must be letters, digits, dots, dashes or underscores");
        }
        byte[] random = new byte[BYTES];
        new SecureRandom().nextBytes(random);
        String token = Base64.getUrlEncoder().withoutPadding().encodeToString(random);
        PrintWriter out = spec.commandLine().getOut();
        out.println("token (shown once):      " + token);
        out.println("line for the token file: " + Tokens.line(role, name, token));
        out.flush();
        return 0;
    }
}
