package org.laddergate.records;

import java.sql.PreparedStatement;
import java.sql.SQLException;
import java.sql.Types;

/** Binds the parameters of one statement from left to right. */
final class Row {
    private final PreparedStatement statement;
    private int index;

    private Row(PreparedStatement statement) {
        this.statement = statement;
    }

    static Row of(PreparedStatement statement) {
        return new Row(statement);
    }

    Row text(String value) throws SQLException {
        statement.setString(++index, value);
        return this;
    }

    Row integer(long value) throws SQLException {
        statement.setLong(++index, value);
        return this;
    }

    Row flag(boolean value) throws SQLException {
        return integer(value ? 1 : 0);
    }

    /** NaN becomes NULL, as SQLite would do by itself; said here because the reading side undoes it. */
    Row real(double value) throws SQLException {
        if (Double.isNaN(value)) {
            statement.setNull(++index, Types.REAL);
        } else {
            statement.setDouble(++index, value);
        }
        return this;
    }

    Row blob(byte[] value) throws SQLException {
        statement.setBytes(++index, value);
        return this;
    }

    void insert() throws SQLException {
        statement.executeUpdate();
    }
}
