using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>
/// Everything durable, in one SQLite file: journal, timelines, outcomes with the state of their delivery, what is to be
/// fetched, cursors, leases, due times. Read verbs see one snapshot each. The task of a write verb completes only after the
/// transaction is on disk; all writes that wait go into one transaction. Safe for concurrent callers.
/// </summary>
public sealed partial class Store : IAsyncDisposable
{
    private readonly Writer _writer;
    private readonly Readers _readers;

    // of their own: a caller that holds a history may still read, however many hold one
    private readonly Readers _histories;
    private readonly Records _records;

    private Store(Session session, string path, Func<string, Kind?> kinds)
    {
        _writer = new Writer(session);
        _readers = new Readers(path);
        _histories = new Readers(path);
        _records = new Records(kinds);
    }

    /// <summary>Why the store has stopped; null while it works. Once set, every write is refused.</summary>
    public StoreException? Failure => _writer.Failure;

    /// <summary>Completes when a write or commit has failed.</summary>
    public Task<StoreException> WhenFailed => _writer.WhenFailed;

    /// <summary>Opens or creates the file and brings it to this software's schema.</summary>
    /// <param name="path">The file, on a local file system; its folder must exist. A new one is readable by its owner only.</param>
    /// <param name="kinds">Kinds by key: those of <see cref="Kinds"/>, of the catalogue, and <see cref="Events"/>.</param>
    /// <exception cref="StoreException">store-not-durable, store-newer-than-software, store-unusable.</exception>
    public static Store Open(string path, Func<string, Kind?> kinds)
    {
        ArgumentNullException.ThrowIfNull(kinds);
        path = Path.GetFullPath(path);
        CreatePrivate(path);
        var session = Session.Open(path, readOnly: false);
        try
        {
            SchemaScripts.Apply(session);
            return new Store(session, path, kinds);
        }
        catch
        {
            session.Dispose();
            throw;
        }
    }

    /// <summary>Number of a patient; null when nothing of the patient has come in.</summary>
    public long? PatientNumber(string source, string reference) => _readers.Read(session => session.Number(Sql.FindPatient, source, reference));

    /// <summary>Source and reference of a patient; null when there is none with this number.</summary>
    public (string Source, string Reference)? PatientName(long patient) => _readers.Read(session => Name(session, patient));

    /// <summary>Problems found by a full check of the file; empty when it is sound. Reads everything.</summary>
    public IReadOnlyList<string> CheckIntegrity() => _readers.Read<IReadOnlyList<string>>(session =>
    {
        var problems = session.All(Sql.IntegrityCheck, row => row.GetString(0));
        problems.Remove("ok");
        if (session.Number(Sql.ForeignKeyCheck) is > 0 and var dangling)
        {
            problems.Add($"{dangling} dangling references");
        }

        return problems;
    });

    /// <summary>Writes what waits and closes the file.</summary>
    public async ValueTask DisposeAsync()
    {
        await _writer.DisposeAsync();
        _readers.Dispose();
        _histories.Dispose();
    }

    /// <summary>An action in the next transaction; for tests of the engine.</summary>
    internal Task<T> WriteAsync<T>(Func<Session, T> action) => _writer.RunAsync(action);

    // Patient data is for the service alone; SQLite gives its side files the mode of this one.
    private static void CreatePrivate(string path)
    {
        if (File.Exists(path) || OperatingSystem.IsWindows())
        {
            return;
        }

        try
        {
            var options = new FileStreamOptions
            {
                Mode = FileMode.CreateNew,
                Access = FileAccess.Write,
                UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite,
            };
            File.Open(path, options).Dispose();
        }
        catch (Exception problem) when (problem is IOException or UnauthorizedAccessException)
        {
            throw new StoreException(StoreException.Unusable, $"cannot create {path}: {problem.Message}", problem);
        }
    }

    private static (string Source, string Reference)? Name(Session session, long patient) =>
        session.One<(string, string)?>(Sql.PatientName, row => (row.GetString(0), row.GetString(1)), patient);

    private static void Count(Session session, string tally) => session.Execute(Sql.AddTally, tally, 1);
}
