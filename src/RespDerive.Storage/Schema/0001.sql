-- Times are UTC ticks (100 ns since 0001-01-01); a missing part of a version order is the least 64-bit integer.

CREATE TABLE patient (
    id        INTEGER PRIMARY KEY,
    source    TEXT NOT NULL,
    reference TEXT NOT NULL,
    UNIQUE (source, reference)
) STRICT;

-- One row per resource; winner and patient are those of its winning version.
CREATE TABLE resource (
    id        INTEGER PRIMARY KEY,
    source    TEXT NOT NULL,
    type      TEXT NOT NULL,
    rid       TEXT NOT NULL,
    reference TEXT NOT NULL,
    winner    INTEGER REFERENCES version (id),
    patient   INTEGER REFERENCES patient (id),
    UNIQUE (source, type, rid)
) STRICT;
CREATE INDEX resource_by_reference ON resource (source, reference);

-- The journal: one row per resource version, never changed. links: references that URNs in the body stood for in the
-- Bundle that brought it, a JSON object.
CREATE TABLE version (
    id       INTEGER PRIMARY KEY,
    resource INTEGER NOT NULL REFERENCES resource (id),
    base     TEXT NOT NULL,
    version  TEXT NOT NULL,
    updated  INTEGER NOT NULL,
    number   INTEGER NOT NULL,
    digest   TEXT NOT NULL,
    patient  INTEGER REFERENCES patient (id),
    arrived  INTEGER NOT NULL,
    gone     INTEGER NOT NULL,
    body     BLOB NOT NULL,
    links    TEXT,
    UNIQUE (resource, updated, number, digest)
) STRICT;

-- What the winning versions refer to.
CREATE TABLE reference (
    source   TEXT NOT NULL,
    target   TEXT NOT NULL,
    resource INTEGER NOT NULL REFERENCES resource (id),
    PRIMARY KEY (source, target, resource)
) STRICT, WITHOUT ROWID;
CREATE INDEX reference_by_resource ON reference (resource);

-- Names other than the reference by which the winning versions can be referred to: identifier:system|value.
CREATE TABLE name (
    source   TEXT NOT NULL,
    name     TEXT NOT NULL,
    resource INTEGER NOT NULL REFERENCES resource (id),
    PRIMARY KEY (source, name, resource)
) STRICT, WITHOUT ROWID;
CREATE INDEX name_by_resource ON name (resource);

-- Resources a patient's next turn has to read; the mark rises with every opening.
CREATE TABLE open (
    mark     INTEGER PRIMARY KEY AUTOINCREMENT,
    patient  INTEGER NOT NULL REFERENCES patient (id),
    resource INTEGER NOT NULL REFERENCES resource (id),
    since    INTEGER NOT NULL,
    UNIQUE (patient, resource)
) STRICT;

-- The primary key is the lock of a patient's turn.
CREATE TABLE turn (
    patient INTEGER NOT NULL REFERENCES patient (id),
    n       INTEGER NOT NULL,
    at      INTEGER NOT NULL,
    PRIMARY KEY (patient, n)
) STRICT, WITHOUT ROWID;

CREATE TABLE person (
    patient INTEGER PRIMARY KEY REFERENCES patient (id),
    body    BLOB NOT NULL
) STRICT;

CREATE TABLE reading (
    id       INTEGER PRIMARY KEY,
    patient  INTEGER NOT NULL REFERENCES patient (id),
    kind     TEXT NOT NULL,
    at       INTEGER NOT NULL,
    resource INTEGER NOT NULL REFERENCES resource (id),
    body     BLOB NOT NULL
) STRICT;
CREATE INDEX reading_by_time ON reading (patient, kind, at);
CREATE INDEX reading_by_resource ON reading (patient, resource);

-- One row per identity ever computed, with the state of its delivery. state: 0 the anchor no longer calls, 1 a value,
-- 2 withheld. valued is the last outcome that had a value, while body has none. since is when the wait for delivery began,
-- recorded when the wanted edition came to be.
CREATE TABLE outcome (
    identity   TEXT PRIMARY KEY,
    patient    INTEGER NOT NULL REFERENCES patient (id),
    definition TEXT NOT NULL,
    at         INTEGER NOT NULL,
    state      INTEGER NOT NULL,
    withheld   TEXT,
    body       BLOB,
    valued     BLOB,
    wanted     INTEGER NOT NULL,
    delivered  INTEGER NOT NULL DEFAULT 0,
    since      INTEGER NOT NULL,
    recorded   INTEGER NOT NULL,
    revisions  INTEGER NOT NULL DEFAULT 0,
    final_seen INTEGER NOT NULL DEFAULT 0,
    retracted  INTEGER NOT NULL DEFAULT 0,
    server_id  TEXT,
    server_version TEXT,
    tries      INTEGER NOT NULL DEFAULT 0,
    due        INTEGER NOT NULL,
    parked     TEXT,
    parked_text TEXT,
    withdrawn  INTEGER NOT NULL DEFAULT 0
) STRICT;
CREATE INDEX outcome_by_time ON outcome (patient, definition, at);
CREATE INDEX outcome_by_at ON outcome (at);
CREATE INDEX outcome_by_state ON outcome (state, withdrawn);
CREATE INDEX outcome_pending ON outcome (due, at) WHERE wanted <> delivered AND parked IS NULL;
CREATE INDEX outcome_parked ON outcome (since) WHERE parked IS NOT NULL;

-- Editions sent, or about to be, of which no answer is known: after a crash the server may hold them. One row per result while
-- under way; counter is the wanted counter, evidence what testifies to the edition.
CREATE TABLE attempt (
    identity TEXT PRIMARY KEY,
    counter  INTEGER NOT NULL,
    digest   TEXT NOT NULL,
    evidence BLOB NOT NULL
) STRICT, WITHOUT ROWID;

-- asked rises with every request, so that one that comes while a fetch is under way is not lost. missing: how often in a
-- row the source did not find it, and since when.
CREATE TABLE fetch (
    id     INTEGER PRIMARY KEY,
    source TEXT NOT NULL,
    target TEXT NOT NULL,
    asked  INTEGER NOT NULL,
    since  INTEGER NOT NULL,
    tries  INTEGER NOT NULL,
    due    INTEGER NOT NULL,
    missing INTEGER NOT NULL DEFAULT 0,
    missing_since INTEGER,
    UNIQUE (source, target)
) STRICT;
CREATE INDEX fetch_by_due ON fetch (due);

CREATE TABLE cursor (
    name  TEXT PRIMARY KEY,
    value TEXT NOT NULL
) STRICT, WITHOUT ROWID;

CREATE TABLE lease (
    name  TEXT PRIMARY KEY,
    owner TEXT NOT NULL,
    until INTEGER NOT NULL,
    epoch INTEGER NOT NULL
) STRICT, WITHOUT ROWID;

CREATE TABLE due (
    purpose TEXT NOT NULL,
    key     TEXT NOT NULL,
    at      INTEGER NOT NULL,
    PRIMARY KEY (purpose, key)
) STRICT, WITHOUT ROWID;
CREATE INDEX due_by_time ON due (at);

-- Totals kept in the transactions that change them.
CREATE TABLE tally (
    name TEXT PRIMARY KEY,
    n    INTEGER NOT NULL
) STRICT, WITHOUT ROWID;
