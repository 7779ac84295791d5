package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ch.qos.logback.classic.Logger;
import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.core.read.ListAppender;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.concurrent.CompletionException;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.laddergate.limits.LimitNotFoundException;
import org.slf4j.LoggerFactory;

class ProblemCodeTest {
    @ParameterizedTest
    @EnumSource(ProblemCode.class)
    void everyCode_hasAStatusATitleAndAdvice(ProblemCode code) {
        assertTrue(code.status() >= 400 && code.status() < 600);
        assertTrue(code.word().matches("[a-z_]+"), code.word());
        assertTrue(!code.title().isBlank() && !code.advice().isBlank());
        assertEquals(code, ProblemCode.find(code.word()).orElseThrow());
    }

    @Test
    @Tag("docs")
    void everyCode_isInTheManual() throws IOException {
        String manual = Files.readString(Path.of("docs/http-api.md"));
        for (ProblemCode code : ProblemCode.values()) {
            assertTrue(manual.contains("| `" + code.word() + "` | " + code.status() + " |"), code.word());
        }
    }

    @Test
    @Tag("http")
    void everyCode_isExplainedByTheService() {
        try (TestService service = TestService.open()) {
            for (ProblemCode code : ProblemCode.values()) {
                String page = service.request().get(code.type()).then().statusCode(200).extract().asString();
                assertTrue(page.contains(code.advice()), page);
            }
        }
    }

    /** The three codes that the domain may name are known here. */
    @Test
    void missingLimits_keepTheirCode() {
        for (ProblemCode code : new ProblemCode[] {ProblemCode.UNKNOWN_PRODUCT, ProblemCode.UNKNOWN_REVISION,
            ProblemCode.NO_RELEASED_LIMITS}) {
            assertEquals(code, Problems.of(new CompletionException(new LimitNotFoundException(code.word(), "x")), "r")
                    .code());
        }
    }

    @Test
    void faultOfOurs_isLoggedInFullAndTellsNothingOutside() {
        Logger logger = (Logger) LoggerFactory.getLogger(Problems.class);
        ListAppender<ILoggingEvent> log = new ListAppender<>();
        log.start();
        logger.addAppender(log);
        logger.setAdditive(false);
        try {
            Problem problem = Problems.of(new IllegalStateException("secret"), "r-1");
            assertEquals(ProblemCode.INTERNAL_FAULT, problem.code());
            assertFalse(new String(problem.json("r-1"), StandardCharsets.UTF_8).contains("secret"));
        } finally {
            logger.setAdditive(true);
            logger.detachAppender(log);
        }
        assertEquals("request r-1 failed", log.list.get(0).getFormattedMessage());
        assertEquals("secret", log.list.get(0).getThrowableProxy().getMessage());
    }
}
