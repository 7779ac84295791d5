package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.time.Duration;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CountDownLatch;
import org.junit.jupiter.api.Test;

class WorkGateTest {
    @Test
    void oneTooMany_isTurnedAwayAndLaterLetIn() throws Exception {
        WorkGate gate = new WorkGate(1, Duration.ofMillis(20));
        CountDownLatch inside = new CountDownLatch(1);
        CountDownLatch leave = new CountDownLatch(1);
        CompletableFuture<String> first = CompletableFuture.supplyAsync(() -> gate.compute(() -> {
            inside.countDown();
            await(leave);
            return "first";
        }));
        inside.await();
        ProblemException refused = assertThrows(ProblemException.class, () -> gate.compute(() -> "second"));
        assertEquals(ProblemCode.OVERLOADED, refused.problem().code());
        assertEquals("2", refused.problem().headers().get("Retry-After"));
        leave.countDown();
        assertEquals("first", first.get());
        assertEquals("third", gate.compute(() -> "third"));
    }

    @Test
    void failedWork_givesItsPlaceBack() {
        WorkGate gate = new WorkGate(1, Duration.ZERO);
        assertThrows(IllegalArgumentException.class, () -> gate.compute(() -> {
            throw new IllegalArgumentException("provoked");
        }));
        assertEquals("next", gate.compute(() -> "next"));
    }

    private static void await(CountDownLatch latch) {
        try {
            latch.await();
        } catch (InterruptedException e) {
            throw new AssertionError(e);
        }
    }
}
