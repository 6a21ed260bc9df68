using Microsoft.Data.Sqlite;

namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>
    /// Results whose wanted edition is not at the server, not parked, and due; the longest due first, those of one turn by event time.
    /// Partition p of n holds the patients whose number leaves the remainder p.
    /// </summary>
    public IReadOnlyList<Delivery> DueDeliveries(DateTimeOffset now, int limit, int partition = 0, int partitions = 1) =>
        _readers.Read(session => session.All(Sql.DueDeliveries, ReadDelivery, now.UtcTicks, partition, partitions, limit));

    /// <summary>What a person has to look at, the longest waiting first.</summary>
    public IReadOnlyList<Delivery> ParkedDeliveries(int limit) => _readers.Read(session => session.All(Sql.ParkedDeliveries, ReadDelivery, limit));

    /// <summary>Outcome and delivery state of an identity; null when it was never computed.</summary>
    public Delivery? FindDelivery(Guid identity) => _readers.Read(session => session.One(Sql.FindDelivery, ReadDelivery, Columns.Identity(identity)));

    /// <summary>
    /// An edition is about to be sent; until the server's answer is marked, the server may hold it. Replaces the attempt before it.
    /// </summary>
    /// <param name="identity">The result.</param>
    /// <param name="attempt">What is sent.</param>
    public Task<bool> MarkAttemptAsync(Guid identity, Attempt attempt)
    {
        ArgumentNullException.ThrowIfNull(attempt);
        return UpdateAsync(Sql.MarkAttempt, identity, attempt.Wanted, attempt.Digest, attempt.Evidence);
    }

    /// <summary>The server has taken the edition. False when it was marked before.</summary>
    /// <param name="identity">The result.</param>
    /// <param name="wanted">The counter of the edition that was sent; a later one stays pending.</param>
    /// <param name="serverId">Logical id.</param>
    /// <param name="serverVersion">Version that the server gave it.</param>
    /// <param name="finalSeen">The edition was final, amended or corrected.</param>
    /// <param name="retracted">The edition was a retraction.</param>
    public Task<bool> MarkDeliveredAsync(Guid identity, long wanted, string serverId, string? serverVersion, bool finalSeen, bool retracted = false) => _writer.RunAsync(session =>
    {
        var marked = session.Execute(Sql.MarkDelivered, Columns.Identity(identity), wanted, serverId, serverVersion, finalSeen ? 1 : 0, retracted ? 1 : 0) == 1;
        if (marked)
        {
            session.Execute(Sql.EndAttempt, Columns.Identity(identity), wanted);
            Count(session, Tallies.Delivered);
        }

        return marked;
    });

    /// <summary>The server holds an edition of ours that we had lost sight of; the wanted one stays pending, due at once.</summary>
    /// <param name="identity">The result.</param>
    /// <param name="serverId">Logical id.</param>
    /// <param name="serverVersion">Version that the server gave it.</param>
    /// <param name="revision">Revision of the edition; later ones count from it.</param>
    /// <param name="finalSeen">The edition is final, amended or corrected, or follows one.</param>
    /// <param name="retracted">The edition is a retraction.</param>
    public Task<bool> AdoptAsync(Guid identity, string serverId, string serverVersion, long revision, bool finalSeen, bool retracted) =>
        EndAsync(Sql.Adopt, identity, serverId, serverVersion, revision, finalSeen ? 1 : 0, retracted ? 1 : 0);

    /// <summary>There is nothing to send for the edition, as for a value withheld from the start.</summary>
    public Task<bool> MarkNothingToSendAsync(Guid identity, long wanted) => UpdateAsync(Sql.MarkNothingToSend, identity, wanted);

    /// <summary>To be tried again.</summary>
    public Task<bool> MarkRetryAsync(Guid identity, int tries, DateTimeOffset due) => UpdateAsync(Sql.MarkRetry, identity, tries, due.UtcTicks);

    /// <summary>Refused for good; later editions wait behind it until <see cref="ResendAsync"/> or <see cref="DropAsync"/>.</summary>
    public Task<bool> ParkAsync(Guid identity, string code, string text) => UpdateAsync(Sql.Park, identity, code, text);

    /// <summary>Takes a parked result back into delivery, due at once.</summary>
    public Task<bool> ResendAsync(Guid identity) => UpdateAsync(Sql.Resend, identity);

    /// <summary>Gives up the waiting editions of a parked result; the next change is delivered again.</summary>
    public Task<bool> DropAsync(Guid identity) => UpdateAsync(Sql.Drop, identity);

    /// <summary>A person has withdrawn the result at the server: final, no further edition is ever sent.</summary>
    public Task<bool> WithdrawnByPersonAsync(Guid identity) => EndAsync(Sql.WithdrawByPerson, identity);

    /// <summary>Since when the oldest delivery waits that is not parked; null when none does.</summary>
    public DateTimeOffset? OldestPending() =>
        _readers.Read(session => session.Number(Sql.OldestPending) is { } ticks ? Columns.Time(ticks) : (DateTimeOffset?)null);

    private Task<bool> UpdateAsync(string sql, Guid identity, params object?[] values) =>
        _writer.RunAsync(session => session.Execute(sql, [Columns.Identity(identity), .. values]) == 1);

    // what was attempted before is known now
    private Task<bool> EndAsync(string sql, Guid identity, params object?[] values) => _writer.RunAsync(session =>
    {
        var ended = session.Execute(sql, [Columns.Identity(identity), .. values]) == 1;
        if (ended)
        {
            session.Execute(Sql.EndAttempt, Columns.Identity(identity), long.MaxValue);
        }

        return ended;
    });

    private Delivery ReadDelivery(SqliteDataReader row)
    {
        var current = Columns.OptionalBytes(row, 2) is { } body ? _records.Outcome(body) : null;
        var valued = Columns.OptionalBytes(row, 3) is { } last ? _records.Outcome(last) : null;
        return new Delivery
        {
            Identity = Guid.Parse(row.GetString(0)),
            Patient = row.GetInt64(1),
            Current = current,
            LastValued = current is { Withheld: null } ? current : valued,
            Wanted = row.GetInt64(4),
            Delivered = row.GetInt64(5),
            Revisions = row.GetInt64(6),
            FinalSeen = row.GetInt64(7) == 1,
            ServerId = Columns.OptionalText(row, 8),
            ServerVersion = Columns.OptionalText(row, 9),
            Tries = row.GetInt32(10),
            Due = Columns.Time(row.GetInt64(11)),
            Since = Columns.Time(row.GetInt64(12)),
            Parked = Columns.OptionalText(row, 13),
            ParkedText = Columns.OptionalText(row, 14),
            WithdrawnByPerson = row.GetInt64(15) == 1,
            Retracted = row.GetInt64(16) == 1,
            Recorded = Columns.Time(row.GetInt64(17)),
            Attempt = Columns.OptionalText(row, 19) is { } digest ? new Attempt(row.GetInt64(18), digest, row.GetFieldValue<byte[]>(20)) : null,
        };
    }
}
