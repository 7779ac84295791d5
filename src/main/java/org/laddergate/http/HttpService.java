package org.laddergate.http;

import io.javalin.Javalin;
import io.javalin.config.JavalinConfig;
import io.javalin.http.Context;
import io.javalin.http.NotFoundResponse;
import io.javalin.util.JavalinBindException;
import jakarta.servlet.http.HttpServletResponse;
import java.io.IOException;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import org.eclipse.jetty.server.handler.GracefulHandler;
import org.eclipse.jetty.util.thread.QueuedThreadPool;
import org.laddergate.measurement.CurveRules;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** The running HTTP service. {@link #close} lets running requests finish. */
public final class HttpService implements AutoCloseable {
    private static final Logger LOG = LoggerFactory.getLogger(HttpService.class);
    private static final Duration GATE_PATIENCE = Duration.ofSeconds(5);
    /** Threads that Jetty itself needs to accept and watch connections. */
    private static final int SERVER_THREADS = 4;

    private final Services services;
    private final HttpSettings settings;
    private final QueuedThreadPool threads;
    private final List<Route> routes;
    private final AccessCheck access;
    private final Javalin javalin;
    private volatile boolean draining;

    private HttpService(HttpSettings settings, Services services, Tokens tokens) {
        this.settings = settings;
        this.services = services;
        this.access = new AccessCheck(tokens);
        this.threads = new QueuedThreadPool(settings.requestThreads() + SERVER_THREADS, SERVER_THREADS);
        threads.setName("http");
        this.routes = routes();
        this.javalin = Javalin.create(this::configure);
    }

    /**
     * Starts listening; returns when it does.
     *
     * @throws IllegalStateException if the port is taken or not allowed
     */
    public static HttpService start(HttpSettings settings, Services services, Tokens tokens) {
        HttpService service = new HttpService(settings, services, tokens);
        try {
            service.javalin.start();
        } catch (JavalinBindException e) {
            throw new IllegalStateException("cannot listen on " + settings.host() + ":" + settings.port()
                    + "; the port is taken or not allowed", e);
        }
        return service;
    }

    public int port() {
        return javalin.port();
    }

    List<Route> table() {
        return routes;
    }

    /** Reports not ready, lets running requests finish, and stops. */
    @Override
    public void close() {
        draining = true;
        javalin.stop();
    }

    private List<Route> routes() {
        Bodies bodies = new Bodies(settings.maximumBodyBytes());
        WorkGate gate = new WorkGate(settings.analysisThreads(), GATE_PATIENCE);
        Intake intake = new Intake(new CurveRules(settings.maximumSamples(), services.clock()), services.products());
        Judging judging = new Judging(intake, services.desk(), gate, services.registry(), services.clock());
        return Routes.table(
                new ProductHandlers(bodies, services.products()),
                new GoldenUnitHandlers(bodies, intake, services.goldenUnits(), gate),
                new LimitHandlers(bodies, services.products(), services.goldenUnits(), services.learning(),
                        services.limits()),
                new TransientHandlers(bodies, judging, services.ledger(), threads),
                new BatchHandler(bodies, judging),
                new ServiceHandlers(services.registry(), this::notReady));
    }

    private List<String> notReady() {
        List<String> reasons = new ArrayList<>(services.notReady().get());
        Optional<String> ledger = services.ledger().whyNotWritable();
        ledger.ifPresent(reasons::add);
        if (draining) {
            reasons.add("the service is stopping");
        }
        return reasons;
    }

    private void configure(JavalinConfig config) {
        config.startup.showJavalinBanner = false;
        config.startup.showOldJavalinVersionWarning = false;
        config.startup.startupWatcherEnabled = false;
        config.concurrency.useVirtualThreads = false;
        config.jetty.threadPool = threads;
        config.jetty.host = settings.host();
        config.jetty.port = settings.port();
        config.jetty.modifyServer(server -> {
            server.setStopTimeout(settings.drain().toMillis());
            server.setErrorHandler(new ServerErrors());
            // Turns new requests on open connections away while running ones finish.
            server.insertHandler(new GracefulHandler());
        });
        config.http.maxRequestSize = settings.maximumBodyBytes();
        config.router.javaLangErrorHandler(HttpService::answerError);
        config.requestLogger.http(new RequestMetrics(services.registry())::record);
        config.routes.beforeMatched(access::check);
        config.routes.after(ctx -> ctx.header("X-Content-Type-Options", "nosniff"));
        config.routes.exception(NotFoundResponse.class, (e, ctx) -> Problems.answer(ctx, noRoute(ctx)));
        config.routes.exception(Exception.class, (e, ctx) -> Problems.answer(ctx, Problems.of(e, RequestId.of(ctx))));
        for (Route route : routes) {
            config.routes.addHttpHandler(route.method(), route.path(), route.handler(), route.access());
        }
    }

    /** Nothing there, or not with this method. */
    private Problem noRoute(Context ctx) {
        String allowed = routes.stream().filter(route -> route.matches(ctx.path()))
                .map(route -> route.method().name()).distinct().sorted().collect(Collectors.joining(", "));
        if (allowed.isEmpty()) {
            return Problem.of(ProblemCode.UNKNOWN_ROUTE, "there is nothing at this address");
        }
        return new Problem(ProblemCode.METHOD_NOT_ALLOWED, "this address takes " + allowed, List.of(),
                Map.of("Allow", allowed));
    }

    private static void answerError(HttpServletResponse response, Error error) {
        String requestId = RequestId.next();
        Problem problem = Problems.of(error, requestId);
        try {
            response.setStatus(problem.code().status());
            response.setContentType(Problem.CONTENT_TYPE);
            response.getOutputStream().write(problem.json(requestId));
        } catch (IOException e) {
            LOG.warn("request {}: the client did not wait for the answer", requestId);
        }
    }
}
