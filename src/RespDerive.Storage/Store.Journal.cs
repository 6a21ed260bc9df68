using RespDerive.Timeline;

namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>
    /// Journals versions, decides the winners, and opens what has to be read again: all of it or nothing, with the cursor.
    /// A version is the triple of its order: with another digest it is another version, also under the same time and number.
    /// Between versions without time and number arrival decides; a repeat of one never wins again.
    /// </summary>
    /// <returns>One answer per arrival.</returns>
    public Task<IReadOnlyList<Appended>> AppendAsync(IReadOnlyList<Arrival> arrivals, Cursor? cursor = null)
    {
        ArgumentNullException.ThrowIfNull(arrivals);
        return _writer.RunAsync<IReadOnlyList<Appended>>(
            session =>
            {
                var answers = arrivals.Select(arrival => new Append(session, arrival).Run()).ToList();
                if (cursor is not null)
                {
                    session.Execute(Sql.SetCursor, cursor.Name, cursor.Value);
                }

                return answers;
            },
            arrivals.Sum(arrival => (long)arrival.Body.Length));
    }

    /// <summary>The winning version of a resource, also when it is gone; null when none has come in.</summary>
    public ResourceBody? Find(string source, string reference) => _readers.Read(session => session.One(Sql.FindBody, Columns.Body, source, reference));

    /// <summary>Arrival time of the oldest resource version still to be read; null when all are.</summary>
    public DateTimeOffset? OldestOpen() => _readers.Read(session => session.Number(Sql.OldestOpen) is { } ticks ? Columns.Time(ticks) : (DateTimeOffset?)null);
}
