-- Verdicts are insert-only. Units stand in the column names; a number that was not there is NULL.
CREATE TABLE verdict (
    sequence            INTEGER PRIMARY KEY CHECK (sequence > 0),
    measurement_id      TEXT    NOT NULL UNIQUE,
    content_sha256      TEXT    NOT NULL CHECK (length(content_sha256) = 64),
    product             TEXT    NOT NULL,
    serial              TEXT    NOT NULL,
    lot                 TEXT    NOT NULL,
    station             TEXT    NOT NULL,
    measured_at         TEXT    NOT NULL,
    measured_at_utc_us  INTEGER NOT NULL,
    curve_kind          TEXT    NOT NULL CHECK (curve_kind IN ('COOLING', 'HEATING')),
    heating_power_w     REAL    NOT NULL CHECK (heating_power_w > 0),
    heating_s           REAL,
    attempt             INTEGER NOT NULL CHECK (attempt > 0),
    stored_at           TEXT    NOT NULL,
    outcome             TEXT    NOT NULL CHECK (outcome IN ('PASS', 'FAIL', 'INVALID')),
    disposition         TEXT    NOT NULL CHECK (disposition IN ('ACCEPT', 'REJECT', 'RETEST', 'HOLD')),
    failing_region      TEXT    NOT NULL,
    other_suspects      TEXT    NOT NULL,
    decision_confidence REAL,
    envelope_inside     INTEGER NOT NULL CHECK (envelope_inside IN (0, 1)),
    envelope_exit_j_per_k REAL,
    in_family_statistic REAL,
    in_family_limit     REAL,
    limit_revision      INTEGER NOT NULL,
    limit_sha256        TEXT    NOT NULL,
    algorithm_version   TEXT    NOT NULL
) STRICT;

CREATE INDEX verdict_by_part ON verdict (product, serial, sequence);

CREATE TABLE region_result (
    sequence               INTEGER NOT NULL REFERENCES verdict (sequence),
    position               INTEGER NOT NULL CHECK (position >= 0),
    region                 TEXT    NOT NULL,
    role                   TEXT    NOT NULL CHECK (role IN ('PART', 'FIXTURE')),
    assessed               INTEGER NOT NULL CHECK (assessed IN (0, 1)),
    rth_k_per_w            REAL,
    uncertainty_k_per_w    REAL,
    lower_limit_k_per_w    REAL,
    upper_limit_k_per_w    REAL,
    probability_conforming REAL,
    fault_probability      REAL,
    PRIMARY KEY (sequence, position)
) STRICT, WITHOUT ROWID;

CREATE TABLE reason (
    sequence INTEGER NOT NULL REFERENCES verdict (sequence),
    position INTEGER NOT NULL CHECK (position >= 0),
    code     TEXT    NOT NULL,
    sentence TEXT    NOT NULL,
    value    REAL,
    bound    REAL,
    PRIMARY KEY (sequence, position)
) STRICT, WITHOUT ROWID;

-- Curves stand apart so that scans of verdicts stay small. Little-endian 64 bit floats and 32 bit integers.
CREATE TABLE trace (
    sequence                 INTEGER PRIMARY KEY REFERENCES verdict (sequence),
    bin_times_s              BLOB NOT NULL,
    bin_temperatures_c       BLOB NOT NULL,
    bin_counts               BLOB NOT NULL,
    structure_r_k_per_w      BLOB NOT NULL,
    structure_c_j_per_k      BLOB NOT NULL
) STRICT;
