package org.laddergate.app;

import java.io.IOException;
import java.net.URI;
import java.time.Clock;
import java.util.Map;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.function.Function;
import org.laddergate.demo.DemoFolders;
import org.laddergate.demo.DemoLine;
import org.laddergate.http.HttpService;
import org.laddergate.http.Tokens;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** The service with two invented products and a short simulated line. */
@Command(name = "demo", mixinStandardHelpOptions = true, sortOptions = false,
        description = {"Run the service with the two invented demo products, let a simulated line post parts with known",
            "faults, print truth against verdict, and leave the service up until it is asked to end."})
final class DemoCommand implements Callable<Integer> {
    private final Function<Settings, Wiring> wiring;
    private final Map<String, String> environment;
    @Spec
    private CommandSpec spec;
    @Option(names = "--parts", paramLabel = "<number>", defaultValue = "200",
            description = "parts the line posts (${DEFAULT-VALUE})")
    private int parts;
    @Option(names = "--rate", paramLabel = "<per second>", defaultValue = "20",
            description = "parts a second at most (${DEFAULT-VALUE})")
    private double rate;
    @Option(names = "--seed", paramLabel = "<number>", defaultValue = "1",
            description = "seed of the parts (${DEFAULT-VALUE})")
    private long seed;
    @Option(names = "--make", description = "instead: make golden units and limits of the demo products in their folders")
    private boolean make;
    @Option(names = "--once", description = "end after the line instead of leaving the service up")
    private boolean once;

    DemoCommand(Function<Settings, Wiring> wiring, Map<String, String> environment) {
        this.wiring = wiring;
        this.environment = environment;
    }

    @Override
    public Integer call() throws Exception {
        Settings settings = SettingOptions.read(spec, environment);
        if (make) {
            DemoFolders.write(settings.goldenUnits(), settings.limits(), Clock.systemUTC());
            return 0;
        }
        Wiring wired = wiring.apply(settings);
        HttpService service;
        try {
            service = HttpService.start(settings.http(), wired.services(), Tokens.none());
        } catch (RuntimeException e) {
            wired.close();
            throw e;
        }
        CountDownLatch stopped = new CountDownLatch(1);
        Thread stop = new Thread(() -> {
            service.close();
            wired.close();
            stopped.countDown();
        }, "shutdown");
        Runtime.getRuntime().addShutdownHook(stop);
        runLine(service.port());
        if (once) {
            return 0;
        }
        System.out.printf("%nThe service listens on http://127.0.0.1:%d until you end it (Ctrl+C).%n", service.port());
        stopped.await();
        return 0;
    }

    private void runLine(int port) throws IOException, InterruptedException {
        new DemoLine(URI.create("http://127.0.0.1:" + port), Clock.systemUTC(), System.out).run(parts, rate, seed);
    }
}
