namespace RespDerive.Storage;

/// <summary>Every statement, in the dialect of SQLite; a second dialect would be a second file like this and another Session.</summary>
internal static class Sql
{
    // connection
    public static readonly string[] Settings =
    [
        "PRAGMA busy_timeout=5000",
        "PRAGMA journal_mode=WAL",
        "PRAGMA synchronous=FULL",
        "PRAGMA foreign_keys=ON",
        "PRAGMA journal_size_limit=67108864",
    ];

    public const string JournalMode = "PRAGMA journal_mode";
    public const string Synchronous = "PRAGMA synchronous";
    public const string QueryOnly = "PRAGMA query_only=1";
    public const string ApplicationId = "PRAGMA application_id";
    public const string SetApplicationId = "PRAGMA application_id=";
    public const string IntegrityCheck = "PRAGMA integrity_check";
    public const string ForeignKeyCheck = "SELECT count(*) FROM pragma_foreign_key_check";
    public const string TableCount = "SELECT count(*) FROM sqlite_master";
    public const string CreateSchemaVersion = "CREATE TABLE IF NOT EXISTS schema_version (version INTEGER PRIMARY KEY) STRICT";
    public const string SchemaVersion = "SELECT max(version) FROM schema_version";
    public const string SetSchemaVersion = "INSERT INTO schema_version (version) VALUES ($1)";

    // transactions
    public const string Begin = "BEGIN IMMEDIATE";
    public const string BeginRead = "BEGIN";
    public const string Commit = "COMMIT";
    public const string Rollback = "ROLLBACK";
    public const string Savepoint = "SAVEPOINT item";
    public const string RollbackTo = "ROLLBACK TO item";
    public const string Release = "RELEASE item";

    // patients
    public const string FindPatient = "SELECT id FROM patient WHERE source = $1 AND reference = $2";
    public const string AddPatient = "INSERT INTO patient (source, reference) VALUES ($1, $2) RETURNING id";
    public const string PatientName = "SELECT source, reference FROM patient WHERE id = $1";

    // journal
    public const string FindResource = "SELECT id, winner, patient FROM resource WHERE source = $1 AND type = $2 AND rid = $3";
    public const string AddResource = "INSERT INTO resource (source, type, rid, reference) VALUES ($1, $2, $3, $4) RETURNING id";
    public const string FindVersion = "SELECT id FROM version WHERE resource = $1 AND updated = $2 AND number = $3 AND digest = $4";

    public const string AddVersion =
        """
        INSERT INTO version (resource, base, version, updated, number, digest, patient, arrived, gone, body, links)
        VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11) RETURNING id
        """;

    public const string VersionOrder = "SELECT updated, number, digest FROM version WHERE id = $1";
    public const string IsGone = "SELECT gone FROM version WHERE id = $1";
    public const string SetWinner = "UPDATE resource SET winner = $2, patient = $3 WHERE id = $1";
    public const string ReferencesOf = "SELECT target FROM reference WHERE resource = $1";
    public const string ClearReferences = "DELETE FROM reference WHERE resource = $1";
    public const string AddReference = "INSERT INTO reference (source, target, resource) VALUES ($1, $2, $3) ON CONFLICT DO NOTHING";

    public const string NamesOf = "SELECT name FROM name WHERE resource = $1";
    public const string ClearNames = "DELETE FROM name WHERE resource = $1";
    public const string AddName = "INSERT INTO name (source, name, resource) VALUES ($1, $2, $3) ON CONFLICT DO NOTHING";

    public const string Referring =
        """
        SELECT r.id, r.patient, r.reference FROM reference f JOIN resource r ON r.id = f.resource
        WHERE f.source = $1 AND f.target = $2
        """;

    public const string Member = "SELECT id, patient FROM resource WHERE source = $1 AND reference = $2 AND type = 'Observation'";

    private const string Body =
        """
        SELECT r.source, r.type, r.rid, v.base, v.version, v.updated, v.number, v.digest, p.reference, v.body, v.arrived, v.gone, v.links
        FROM resource r JOIN version v ON v.id = r.winner LEFT JOIN patient p ON p.id = v.patient
        """;

    public const string FindBody = Body + " WHERE r.source = $1 AND r.reference = $2";

    // of several with one name, the one that came first
    public const string FindNamed = Body + " JOIN name n ON n.resource = r.id WHERE n.source = $1 AND n.name = $2 ORDER BY r.id LIMIT 1";

    public const string Panels = Body +
        """
         JOIN reference f ON f.resource = r.id
        WHERE f.source = $1 AND f.target = $2 AND r.type IN ('Observation', 'DiagnosticReport') AND v.gone = 0
        ORDER BY r.type, r.rid
        """;

    // open rows and turns
    public const string OpenSince = "SELECT since FROM open WHERE patient = $1 AND resource = $2";
    public const string CloseOne = "DELETE FROM open WHERE patient = $1 AND resource = $2";
    public const string Open = "INSERT INTO open (patient, resource, since) VALUES ($1, $2, $3)";
    public const string CloseUpTo = "DELETE FROM open WHERE patient = $1 AND mark <= $2";
    public const string AnyOpenAfter = "SELECT 1 FROM open WHERE patient = $1 AND mark > $2 LIMIT 1";
    public const string OpenPatients = "SELECT patient FROM open GROUP BY patient ORDER BY min(mark) LIMIT $1";
    public const string OldestOpen = "SELECT min(since) FROM open";

    // a body that went to another patient is not loaded
    public const string OpenBodies =
        """
        SELECT r.source, r.type, r.rid, v.base, v.version, v.updated, v.number, v.digest, p.reference,
               CASE WHEN r.patient = o.patient THEN v.body ELSE x'' END, v.arrived, v.gone, v.links,
               o.mark, CASE WHEN r.patient = o.patient THEN 0 ELSE 1 END
        FROM open o JOIN resource r ON r.id = o.resource JOIN version v ON v.id = r.winner LEFT JOIN patient p ON p.id = v.patient
        WHERE o.patient = $1 ORDER BY o.mark LIMIT $2
        """;

    public const string LastTurn = "SELECT max(n) FROM turn WHERE patient = $1";
    public const string AddTurn = "INSERT INTO turn (patient, n, at) VALUES ($1, $2, $3) ON CONFLICT DO NOTHING";

    // timeline
    public const string Person = "SELECT body FROM person WHERE patient = $1";
    public const string SetPerson = "INSERT INTO person (patient, body) VALUES ($1, $2) ON CONFLICT (patient) DO UPDATE SET body = excluded.body";
    public const string ClearReadings = "DELETE FROM reading WHERE patient = $1 AND resource = $2";
    public const string AddReading = "INSERT INTO reading (patient, kind, at, resource, body) VALUES ($1, $2, $3, $4, $5)";
    public const string LastBefore = "SELECT max(at) FROM reading WHERE patient = $1 AND kind = $2 AND at < $3 AND at >= $4";
    public const string ReadingsBetween = "SELECT id, body FROM reading WHERE patient = $1 AND kind = $2 AND at >= $3 AND at <= $4";
    public const string ReadingsOfResource = "SELECT kind, body FROM reading WHERE patient = $1 AND resource = $2 ORDER BY id";

    // outcomes
    public const string OutcomesBetween =
        "SELECT body FROM outcome WHERE patient = $1 AND definition = $2 AND at >= $3 AND at <= $4 AND state > 0 ORDER BY at, identity";

    public const string OutcomeState = "SELECT state FROM outcome WHERE identity = $1";

    // $3 now. Nothing more is wanted of what a person has withdrawn.
    public const string SetOutcome =
        """
        INSERT INTO outcome (identity, patient, definition, at, state, withheld, body, wanted, since, recorded, due)
        VALUES ($1, $2, $4, $5, $6, $7, $8, 1, $3, $3, $3)
        ON CONFLICT (identity) DO UPDATE SET
            definition = excluded.definition, at = excluded.at, state = excluded.state, withheld = excluded.withheld, body = excluded.body,
            valued = CASE WHEN excluded.state = 1 THEN NULL WHEN outcome.state = 1 THEN outcome.body ELSE outcome.valued END,
        """ + Want + " WHERE outcome.patient = excluded.patient";

    public const string ClearOutcome =
        "UPDATE outcome SET state = 0, withheld = NULL, body = NULL, valued = CASE WHEN state = 1 THEN body ELSE valued END," + Want +
        " WHERE identity = $1 AND patient = $2";

    // an edition that already waits keeps its place and its back-off
    private const string Want =
        """
            wanted = outcome.wanted + 1 - outcome.withdrawn,
            recorded = $3,
            since = CASE WHEN outcome.wanted = outcome.delivered THEN $3 ELSE outcome.since END,
            due = CASE WHEN outcome.wanted = outcome.delivered THEN $3 ELSE outcome.due END
        """;

    // outbox
    private const string DeliveryColumns =
        """
        SELECT identity, patient, body, valued, wanted, delivered, revisions, final_seen, server_id, server_version,
               tries, due, since, parked, parked_text, withdrawn, retracted, recorded, counter, digest, evidence
        FROM outcome LEFT JOIN attempt USING (identity)
        """;

    public const string DueDeliveries = DeliveryColumns +
        " WHERE wanted <> delivered AND parked IS NULL AND due <= $1 AND patient % $3 = $2 ORDER BY due, at, identity LIMIT $4";

    public const string ParkedDeliveries = DeliveryColumns + " WHERE parked IS NOT NULL ORDER BY since, identity LIMIT $1";
    public const string FindDelivery = DeliveryColumns + " WHERE identity = $1";

    /// <summary>Conditions only for what is asked, so that an index serves it. Parameters: patient, definition, code, withdrawn-by-person, from, to, limit.</summary>
    public static string ListOutcomes(OutcomeFilter filter) => string.Concat(
        DeliveryColumns,
        " WHERE state > 0",
        filter.Patient is null ? "" : " AND patient = $1",
        filter.Definition is null ? "" : " AND definition = $2",
        filter.Code is null ? "" : " AND (CASE WHEN withdrawn = 1 THEN $4 ELSE withheld END) = $3",
        filter.Withheld is { } withheld ? withheld ? " AND (state = 2 OR withdrawn = 1)" : " AND state = 1 AND withdrawn = 0" : "",
        filter.From is null ? "" : " AND at >= $5",
        filter.To is null ? "" : " AND at <= $6",
        " ORDER BY at DESC, identity LIMIT $7");

    /// <summary>Codes along the timelines, without bodies; $1 patient, $2 definition, $3 from, $4 to.</summary>
    public static string Course(OutcomeFilter filter) => string.Concat(
        "SELECT patient, definition, at, withheld FROM outcome WHERE state > 0",
        filter.Patient is null ? "" : " AND patient = $1",
        filter.Definition is null ? "" : " AND definition = $2",
        filter.From is null ? "" : " AND at >= $3",
        filter.To is null ? "" : " AND at <= $4",
        " ORDER BY patient, definition, at, identity");

    public const string MarkAttempt =
        """
        INSERT INTO attempt (identity, counter, digest, evidence) SELECT identity, $2, $3, $4 FROM outcome WHERE identity = $1 AND withdrawn = 0
        ON CONFLICT (identity) DO UPDATE SET counter = excluded.counter, digest = excluded.digest, evidence = excluded.evidence
        """;

    public const string EndAttempt = "DELETE FROM attempt WHERE identity = $1 AND counter <= $2";

    public const string MarkDelivered =
        """
        UPDATE outcome SET delivered = $2, revisions = revisions + 1, server_id = $3, server_version = $4,
            final_seen = CASE WHEN $5 = 1 THEN 1 ELSE final_seen END, retracted = $6, tries = 0
        WHERE identity = $1 AND delivered < $2 AND wanted >= $2 AND withdrawn = 0
        """;

    public const string Adopt =
        """
        UPDATE outcome SET server_id = $2, server_version = $3, revisions = $4,
            final_seen = CASE WHEN $5 = 1 THEN 1 ELSE final_seen END, retracted = $6, tries = 0, due = 0
        WHERE identity = $1 AND withdrawn = 0
        """;

    public const string MarkNothingToSend =
        "UPDATE outcome SET delivered = $2, tries = 0 WHERE identity = $1 AND delivered < $2 AND wanted >= $2 AND withdrawn = 0";

    public const string MarkRetry = "UPDATE outcome SET tries = $2, due = $3 WHERE identity = $1 AND wanted <> delivered";
    public const string Park = "UPDATE outcome SET parked = $2, parked_text = $3 WHERE identity = $1 AND withdrawn = 0";
    public const string Resend = "UPDATE outcome SET parked = NULL, parked_text = NULL, tries = 0, due = 0 WHERE identity = $1 AND parked IS NOT NULL";

    public const string Drop =
        "UPDATE outcome SET parked = NULL, parked_text = NULL, tries = 0, delivered = wanted WHERE identity = $1 AND parked IS NOT NULL";

    public const string WithdrawByPerson =
        "UPDATE outcome SET withdrawn = 1, delivered = wanted, parked = NULL, parked_text = NULL, tries = 0 WHERE identity = $1 AND withdrawn = 0";

    public const string OldestPending = "SELECT min(since) FROM outcome WHERE wanted <> delivered AND parked IS NULL";

    // fetches, cursors, leases, due times
    public const string AddFetch =
        """
        INSERT INTO fetch (source, target, asked, since, tries, due) VALUES ($1, $2, 1, $3, 0, $3)
        ON CONFLICT (source, target) DO UPDATE SET asked = fetch.asked + 1
        """;

    public const string DueFetches = "SELECT id, source, target, asked, tries, since, missing, missing_since FROM fetch WHERE due <= $1 ORDER BY due, id LIMIT $2";
    public const string FetchDone = "DELETE FROM fetch WHERE id = $1 AND asked = $2";
    public const string FetchAgain = "UPDATE fetch SET tries = 0, due = 0, missing = 0, missing_since = NULL WHERE id = $1";
    public const string FetchRetry = "UPDATE fetch SET tries = $2, due = $3, missing = 0, missing_since = NULL WHERE id = $1";

    public const string FetchMissing =
        "UPDATE fetch SET tries = tries + 1, due = $3, missing = missing + 1, missing_since = coalesce(missing_since, $2) WHERE id = $1";

    public const string CountFetches = "SELECT count(*) FROM fetch";
    public const string Cursor = "SELECT value FROM cursor WHERE name = $1";
    public const string SetCursor = "INSERT INTO cursor (name, value) VALUES ($1, $2) ON CONFLICT (name) DO UPDATE SET value = excluded.value";

    public const string TakeLease =
        """
        INSERT INTO lease (name, owner, until, epoch) VALUES ($1, $2, $3, 1)
        ON CONFLICT (name) DO UPDATE SET
            epoch = CASE WHEN lease.owner = excluded.owner AND lease.until > $4 THEN lease.epoch ELSE lease.epoch + 1 END,
            owner = excluded.owner, until = excluded.until
        WHERE lease.owner = excluded.owner OR lease.until <= $4
        RETURNING epoch
        """;

    public const string ReleaseLease = "UPDATE lease SET until = 0 WHERE name = $1 AND owner = $2 AND epoch = $3";
    public const string SetDue = "INSERT INTO due (purpose, key, at) VALUES ($1, $2, $3) ON CONFLICT (purpose, key) DO UPDATE SET at = excluded.at";
    public const string DueItems = "SELECT purpose, key, at FROM due WHERE at <= $1 ORDER BY at, purpose, key LIMIT $2";
    public const string DueDone = "DELETE FROM due WHERE purpose = $1 AND key = $2 AND at = $3";

    // totals
    public const string AddTally = "INSERT INTO tally (name, n) VALUES ($1, $2) ON CONFLICT (name) DO UPDATE SET n = tally.n + excluded.n";
    public const string Tally = "SELECT n FROM tally WHERE name = $1";
    public const string CountReadings = "SELECT count(*) FROM reading";
    public const string CountResults = "SELECT count(*) FROM outcome WHERE state = 1 AND withdrawn = 0";
    public const string CountWithheld = "SELECT count(*) FROM outcome WHERE state = 2 OR (state = 1 AND withdrawn = 1)";
    public const string CountParked = "SELECT count(*) FROM outcome WHERE parked IS NOT NULL";
    public const string CountPending = "SELECT count(*) FROM outcome WHERE wanted <> delivered AND parked IS NULL";
}
