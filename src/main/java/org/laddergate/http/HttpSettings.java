package org.laddergate.http;

import java.time.Duration;
import org.laddergate.measurement.CurveRules;

/**
 * How the service listens and what it bears.
 *
 * @param host              address to bind to
 * @param port              TCP port; 0 for any free one
 * @param maximumBodyBytes  largest accepted body, decompressed [byte]
 * @param maximumSamples    longest accepted curve
 * @param requestThreads    requests received at once
 * @param analysisThreads   requests computed at once
 * @param drain             how long running requests may take to finish at the end
 */
public record HttpSettings(String host, int port, int maximumBodyBytes, int maximumSamples, int requestThreads,
        int analysisThreads, Duration drain) {
    public static final int DEFAULT_BODY_BYTES = 16 * 1024 * 1024;
    public static final int DEFAULT_REQUEST_THREADS = 32;

    /** On this machine only, with defaults for everything else. */
    public static HttpSettings local(int port) {
        return new HttpSettings("127.0.0.1", port, DEFAULT_BODY_BYTES,
                CurveRules.DEFAULT_MAXIMUM_SAMPLES, DEFAULT_REQUEST_THREADS,
                Runtime.getRuntime().availableProcessors(), Duration.ofSeconds(10));
    }
}
