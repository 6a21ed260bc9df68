using Microsoft.Data.Sqlite;

namespace RespDerive.Storage.Tests;

public sealed class OpeningTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("store-").FullName;

    private string File => Path.Combine(_folder, "store.db");

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Every_connection_flushes_each_commit_to_disk(bool readOnly)
    {
        using var session = Session.Open(File, readOnly);

        Assert.Equal("wal", session.One("PRAGMA journal_mode", row => row.GetString(0)));
        Assert.Equal(2, session.Number("PRAGMA synchronous"));
        Assert.Equal(1, session.Number("PRAGMA foreign_keys"));
    }

    // SQLite documentation, "PRAGMA synchronous": in WAL mode NORMAL (1) may roll back a commit after a loss of power, FULL (2) does not.
    [Theory]
    [InlineData("wal", 1L)]
    [InlineData("wal", 0L)]
    [InlineData("delete", 2L)]
    [InlineData("memory", 2L)]
    public void A_connection_that_may_lose_commits_is_refused(string journalMode, long synchronous)
    {
        var refusal = Assert.Throws<StoreException>(() => Session.RequireDurable(journalMode, synchronous));

        Assert.Equal("store-not-durable", refusal.Code);
    }

    [Fact]
    public async Task Files_of_the_store_are_for_their_owner_only()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "no file modes");
        await using var store = Store.Open(File, Some.Kind);
        await store.AppendAsync([Some.Arrival("Observation/1")]);

        Assert.Equal(3, Directory.GetFiles(_folder).Length);
#pragma warning disable CA1416 // skipped there
        Assert.All(Directory.GetFiles(_folder), file => Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, System.IO.File.GetUnixFileMode(file)));
#pragma warning restore CA1416
    }

    [Fact]
    public async Task A_store_is_always_a_file()
    {
        var path = Path.Combine(_folder, ":memory:");
        await using var store = Store.Open(path, Some.Kind);

        Assert.True(System.IO.File.Exists(path));
    }

    [Fact]
    public async Task A_file_of_newer_software_is_refused()
    {
        await Store.Open(File, Some.Kind).DisposeAsync();
        Run("INSERT INTO schema_version VALUES (999)");

        Assert.Equal("store-newer-than-software", Assert.Throws<StoreException>(() => Store.Open(File, Some.Kind)).Code);
    }

    [Fact]
    public void A_file_of_another_program_is_refused_and_left_as_it_was()
    {
        Run("CREATE TABLE theirs (x)");
        var before = System.IO.File.ReadAllBytes(File);

        Assert.Equal("store-unusable", Assert.Throws<StoreException>(() => Store.Open(File, Some.Kind)).Code);
        Assert.Equal(before, System.IO.File.ReadAllBytes(File));
    }

    [Fact]
    public void A_file_that_is_no_database_is_refused()
    {
        System.IO.File.WriteAllText(File, new string('x', 5000));

        Assert.Equal("store-unusable", Assert.Throws<StoreException>(() => Store.Open(File, Some.Kind)).Code);
    }

    [Fact]
    public void A_missing_folder_is_refused() =>
        Assert.Equal("store-unusable", Assert.Throws<StoreException>(() => Store.Open(Path.Combine(_folder, "no", "store.db"), Some.Kind)).Code);

    [Fact]
    public async Task A_sound_file_passes_the_integrity_check()
    {
        await using var store = Store.Open(File, Some.Kind);
        await store.AppendAsync([Some.Arrival("Observation/1")]);

        Assert.Empty(store.CheckIntegrity());
    }

    private void Run(string sql)
    {
        using var connection = new SqliteConnection($"Data Source={File};Pooling=False");
        connection.Open();
        using var command = connection.CreateCommand();
#pragma warning disable CA2100 // constants of this file
        command.CommandText = sql;
#pragma warning restore CA2100
        command.ExecuteNonQuery();
    }
}
