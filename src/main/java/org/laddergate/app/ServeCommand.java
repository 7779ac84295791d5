package org.laddergate.app;

import java.io.IOException;
import java.nio.file.Files;
import java.util.Arrays;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.function.Function;
import java.util.stream.Collectors;
import org.laddergate.http.HttpService;
import org.laddergate.http.Tokens;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Spec;

/** Runs the HTTP service until the process is asked to end. */
@Command(name = "serve", mixinStandardHelpOptions = true, sortOptions = false,
        description = {"Run the HTTP service.",
            "Every setting can also be given by the environment variable named with it."})
final class ServeCommand implements Callable<Integer> {
    private static final Logger LOG = LoggerFactory.getLogger(ServeCommand.class);

    private final Function<Settings, Wiring> wiring;
    private final Map<String, String> environment;
    @Spec
    private CommandSpec spec;

    ServeCommand(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        this.wiring = wiring;
        this.environment = environment;
    }

    @Override
    public Integer call() throws Exception {
        Settings settings = SettingOptions.read(spec, environment);
        warnOfUnknownVariables();
        Tokens tokens = tokens(settings);
        Wiring wired = wiring.apply(settings);
        HttpService service = start(settings, wired, tokens);
        LOG.info("listening on {}:{}", settings.http().host(), service.port());
        CountDownLatch stopped = new CountDownLatch(1);
        Runtime.getRuntime().addShutdownHook(new Thread(() -> stop(service, wired, stopped), "shutdown"));
        stopped.await();
        return 0;
    }

    private static HttpService start(Settings settings, Wiring wired, Tokens tokens) {
        try {
            return HttpService.start(settings.http(), wired.services(), tokens);
        } catch (RuntimeException e) {
            wired.close();
            throw e;
        }
    }

    /** First no more requests, then no more stores. */
    private static void stop(HttpService service, Wiring wired, CountDownLatch stopped) {
        LOG.info("stopping; running requests finish first");
        try {
            service.close();
        } finally {
            wired.close();
            LOG.info("stopped");
            stopped.countDown();
        }
    }

    private static Tokens tokens(Settings settings) throws IOException {
        return settings.tokenFile().isPresent() ? Tokens.parse(Files.readAllLines(settings.tokenFile().get()))
                : Tokens.none();
    }

    /** Only a warning: orchestrators set variables of their own that begin with the name of a service. */
    private void warnOfUnknownVariables() {
        Set<String> known = Arrays.stream(Setting.values()).map(Setting::variable).collect(Collectors.toSet());
        environment.keySet().stream().filter(name -> name.startsWith("LADDERGATE_") && !known.contains(name)).sorted()
                .forEach(name -> LOG.warn("the environment variable {} is unknown and was ignored", name));
    }
}
