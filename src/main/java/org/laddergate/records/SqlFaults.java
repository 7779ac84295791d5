package org.laddergate.records;

import java.sql.SQLException;
import org.sqlite.SQLiteErrorCode;

/** What an SQLite result code means for the ledger. Decided by primary code, never by message text. */
final class SqlFaults {
    private SqlFaults() {}

    /** True if the row itself cannot be stored: it would fail on a healthy disk too, its neighbours would not. */
    static boolean liesInTheRow(SQLException e) {
        return is(e, SQLiteErrorCode.SQLITE_CONSTRAINT) || is(e, SQLiteErrorCode.SQLITE_MISMATCH)
                || is(e, SQLiteErrorCode.SQLITE_TOOBIG) || is(e, SQLiteErrorCode.SQLITE_RANGE);
    }

    /** True if the connection is known to be sound after a rollback; otherwise opening another beats guessing. */
    static boolean leavesConnectionSound(SQLException e) {
        return liesInTheRow(e) || is(e, SQLiteErrorCode.SQLITE_BUSY) || is(e, SQLiteErrorCode.SQLITE_FULL);
    }

    /** One phrase for the operator. */
    static String reason(SQLException e) {
        SQLiteErrorCode code = SQLiteErrorCode.getErrorCode(primaryCode(e));
        String phrase = switch (code) {
            case SQLITE_FULL -> "the disk is full or the database has reached its size limit";
            case SQLITE_BUSY, SQLITE_LOCKED -> "another process holds the write lock";
            case SQLITE_READONLY, SQLITE_PERM -> "the database is read-only";
            case SQLITE_IOERR -> "the disk reports an error";
            case SQLITE_CANTOPEN -> "the database file cannot be opened";
            case SQLITE_CORRUPT -> "the database is damaged";
            case SQLITE_NOTADB -> "the file is not a database";
            case SQLITE_NOMEM -> "out of memory";
            default -> "the database does not work";
        };
        return phrase + " (" + code.name() + ")";
    }

    private static boolean is(SQLException e, SQLiteErrorCode code) {
        return primaryCode(e) == code.code;
    }

    /** Extended codes carry the primary code in the low byte. */
    private static int primaryCode(SQLException e) {
        return e.getErrorCode() & 0xff;
    }
}
