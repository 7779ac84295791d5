package org.laddergate.http;

import java.time.Duration;
import java.util.concurrent.Semaphore;
import java.util.concurrent.TimeUnit;
import java.util.function.Supplier;

/**
 * Lets only as many requests compute at once as there are cores: more would only make each of them slower. Reading
 * bodies and waiting for the disk happen outside. Safe for use from many threads.
 */
final class WorkGate {
    private final Semaphore permits;
    private final Duration patience;

    /**
     * @param permits   computations at once
     * @param patience  how long a request waits before it is turned away
     */
    WorkGate(int permits, Duration patience) {
        this.permits = new Semaphore(permits);
        this.patience = patience;
    }

    /** @throws ProblemException if the service is too busy */
    <T> T compute(Supplier<T> work) {
        enter();
        try {
            return work.get();
        } finally {
            permits.release();
        }
    }

    private void enter() {
        try {
            if (permits.tryAcquire() || permits.tryAcquire(patience.toMillis(), TimeUnit.MILLISECONDS)) {
                return;
            }
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
        throw Problem.retry(ProblemCode.OVERLOADED, "the service has more work than it can do; try again")
                .asException();
    }
}
