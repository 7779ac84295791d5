-- Verdicts and what they were decided on. Rows are only ever inserted.
-- NULL in a REAL column means NaN, which SQLite cannot hold; infinities are stored as such.
-- Instants are nanoseconds since 1970-01-01T00:00Z.
-- Probabilities may leave 0..1 by rounding only: the margin keeps percent out without refusing a part over one ulp.

PRAGMA application_id = 1279543122;  -- 0x4c444752, "LDGR"

CREATE TABLE verdict (
    sequence                     INTEGER PRIMARY KEY CHECK (sequence >= 1),
    measurement_id               TEXT    NOT NULL CHECK (measurement_id <> ''),
    content_sha256               TEXT    NOT NULL CHECK (length(content_sha256) = 64),
    product                      TEXT    NOT NULL CHECK (product <> ''),
    serial                       TEXT    NOT NULL CHECK (serial <> ''),
    lot                          TEXT    NOT NULL,
    station                      TEXT    NOT NULL,
    measured_at_utc_ns           INTEGER NOT NULL,
    measured_at_offset_s         INTEGER NOT NULL CHECK (measured_at_offset_s BETWEEN -64800 AND 64800),
    curve_kind                   TEXT    NOT NULL CHECK (curve_kind IN ('cooling', 'heating')),
    heating_power_w              REAL    NOT NULL CHECK (heating_power_w > 0),
    heating_s                    REAL    NOT NULL CHECK (heating_s > 0),
    attempt                      INTEGER NOT NULL CHECK (attempt >= 1),
    stored_at_utc_ns             INTEGER NOT NULL,
    outcome                      TEXT    NOT NULL CHECK (outcome IN ('pass', 'fail', 'invalid')),
    disposition                  TEXT    NOT NULL CHECK (disposition IN ('accept', 'reject', 'retest', 'hold')),
    failing_region               TEXT    NOT NULL,
    decision_confidence          REAL             CHECK (decision_confidence BETWEEN -1e-9 AND 1 + 1e-9),
    envelope_inside              INTEGER NOT NULL CHECK (envelope_inside IN (0, 1)),
    envelope_first_exit_j_per_k  REAL,
    in_family_statistic          REAL,
    in_family_limit              REAL,
    limit_revision               INTEGER NOT NULL CHECK (limit_revision >= 0),
    limit_sha256                 TEXT    NOT NULL CHECK (length(limit_sha256) = 64),
    algorithm_version            TEXT    NOT NULL
) STRICT;

CREATE UNIQUE INDEX verdict_by_measurement_id ON verdict (measurement_id);
CREATE UNIQUE INDEX verdict_by_serial ON verdict (product, serial, attempt);

CREATE TABLE region_result (
    sequence                     INTEGER NOT NULL REFERENCES verdict (sequence),
    position                     INTEGER NOT NULL CHECK (position >= 0),
    region                       TEXT    NOT NULL,
    role                         TEXT    NOT NULL CHECK (role IN ('part', 'fixture')),
    assessed                     INTEGER NOT NULL CHECK (assessed IN (0, 1)),
    rth_k_per_w                  REAL,
    uncertainty_k_per_w          REAL,
    lower_limit_k_per_w          REAL,
    upper_limit_k_per_w          REAL,
    probability_conforming       REAL             CHECK (probability_conforming BETWEEN -1e-9 AND 1 + 1e-9),
    fault_probability            REAL             CHECK (fault_probability BETWEEN -1e-9 AND 1 + 1e-9),
    PRIMARY KEY (sequence, position)
) STRICT, WITHOUT ROWID;

CREATE TABLE other_suspect (
    sequence                     INTEGER NOT NULL REFERENCES verdict (sequence),
    position                     INTEGER NOT NULL CHECK (position >= 0),
    region                       TEXT    NOT NULL,
    PRIMARY KEY (sequence, position)
) STRICT, WITHOUT ROWID;

CREATE TABLE reason (
    sequence                     INTEGER NOT NULL REFERENCES verdict (sequence),
    position                     INTEGER NOT NULL CHECK (position >= 0),
    code                         TEXT    NOT NULL,
    sentence                     TEXT    NOT NULL,
    value                        REAL,
    bound                        REAL,
    PRIMARY KEY (sequence, position)
) STRICT, WITHOUT ROWID;

-- Little-endian float64 and int32 arrays, kept apart so that a scan of verdicts does not read curves.
CREATE TABLE trace (
    sequence                     INTEGER PRIMARY KEY REFERENCES verdict (sequence),
    bin_time_s                   BLOB    NOT NULL CHECK (length(bin_time_s) % 8 = 0),
    bin_temperature_c            BLOB    NOT NULL CHECK (length(bin_temperature_c) % 8 = 0),
    bin_count                    BLOB    NOT NULL CHECK (length(bin_count) % 4 = 0),
    structure_rth_k_per_w        BLOB    NOT NULL CHECK (length(structure_rth_k_per_w) % 8 = 0),
    structure_cth_j_per_k        BLOB    NOT NULL CHECK (length(structure_cth_j_per_k) % 8 = 0)
) STRICT;

-- Holds a row for an instant only, while the ledger tries out whether writing works again.
CREATE TABLE write_probe (
    probe_id                     INTEGER PRIMARY KEY CHECK (probe_id = 1),
    filler                       BLOB    NOT NULL
) STRICT;

PRAGMA user_version = 1;
