package org.laddergate.records;

import java.sql.Connection;
import java.sql.SQLException;
import java.util.concurrent.CompletableFuture;

/** Something to be done with the writer connection between two commits, by the thread that owns it. */
final class Errand implements WriterRequest {

    /** The work; must leave no transaction open. */
    interface Work {
        void run(Connection connection) throws SQLException;
    }

    private final Work work;
    private final CompletableFuture<Void> done = new CompletableFuture<>();

    Errand(Work work) {
        this.work = work;
    }

    void run(Connection connection) throws SQLException {
        work.run(connection);
        done.complete(null);
    }

    void fail(Throwable cause) {
        done.completeExceptionally(cause);
    }

    CompletableFuture<Void> done() {
        return done;
    }
}
