namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>Takes or renews a lease.</summary>
    /// <returns>Its epoch, which rises with every change of hands or gap; null while another owner holds it.</returns>
    public Task<long?> TryLeaseAsync(string name, string owner, DateTimeOffset until, DateTimeOffset now) =>
        _writer.RunAsync(session => session.Number(Sql.TakeLease, name, owner, until.UtcTicks, now.UtcTicks));

    /// <summary>Gives a lease up; false when it was no longer held in this epoch.</summary>
    public Task<bool> ReleaseLeaseAsync(string name, string owner, long epoch) =>
        _writer.RunAsync(session => session.Execute(Sql.ReleaseLease, name, owner, epoch) == 1);

    /// <summary>Sets the time at which a key becomes due, in place of an earlier setting.</summary>
    public Task<bool> SetDueAsync(DueItem item)
    {
        ArgumentNullException.ThrowIfNull(item);
        return _writer.RunAsync(session => session.Execute(Sql.SetDue, item.Purpose, item.Key, item.At.UtcTicks) == 1);
    }

    /// <summary>What is due, earliest first.</summary>
    public IReadOnlyList<DueItem> DueItems(DateTimeOffset now, int limit) => _readers.Read(session =>
        session.All(Sql.DueItems, row => new DueItem(row.GetString(0), row.GetString(1), Columns.Time(row.GetInt64(2))), now.UtcTicks, limit));

    /// <summary>It was done. False when its time was set anew meanwhile: it stays.</summary>
    public Task<bool> DueDoneAsync(DueItem item)
    {
        ArgumentNullException.ThrowIfNull(item);
        return _writer.RunAsync(session => session.Execute(Sql.DueDone, item.Purpose, item.Key, item.At.UtcTicks) == 1);
    }
}
