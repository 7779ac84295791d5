package org.laddergate.records;

import java.sql.SQLException;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** Holds the writer session and replaces it after faults; handed to the writer thread and used by it only. */
final class SessionKeeper {
    private static final Logger LOG = LoggerFactory.getLogger(SessionKeeper.class);

    private final LedgerFile file;
    /** Empty while the database cannot be opened. */
    private Optional<WriterSession> session;

    private SessionKeeper(LedgerFile file, WriterSession first) {
        this.file = file;
        this.session = Optional.of(first);
    }

    /** @throws LedgerOpenException if the file cannot be used */
    static SessionKeeper open(LedgerFile file) {
        try {
            return new SessionKeeper(file, WriterSession.on(file.create()));
        } catch (SQLException e) {
            throw new LedgerOpenException("the ledger has not the tables of its version: " + SqlFaults.reason(e), e);
        }
    }

    WriterSession current() throws SQLException {
        if (session.isEmpty()) {
            session = Optional.of(WriterSession.on(file.openWriter()));
        }
        return session.get();
    }

    void repairAfter(SQLException e) {
        if (SqlFaults.leavesConnectionSound(e)) {
            renewStatements();
        } else {
            discard();
        }
    }

    void renewStatements() {
        try {
            if (session.isPresent()) {
                session.get().renewStatements();
            }
        } catch (SQLException e) {
            discard();
        }
    }

    void discard() {
        Optional<WriterSession> old = session;
        session = Optional.empty();
        try {
            if (old.isPresent()) {
                old.get().close();
            }
        } catch (SQLException e) {
            LOG.warn("closing the ledger connection failed", e);
        }
    }
}
