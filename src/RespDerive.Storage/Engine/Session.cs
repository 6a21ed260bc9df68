using Microsoft.Data.Sqlite;

namespace RespDerive.Storage;

/// <summary>One connection and its prepared statements; used by one caller at a time. Parameters are $1, $2…</summary>
internal sealed class Session : IDisposable
{
    private readonly SqliteConnection _connection;
    private readonly Dictionary<string, SqliteCommand> _commands = new(StringComparer.Ordinal);

    private Session(SqliteConnection connection) => _connection = connection;

    /// <summary>Opens the file with the settings that make a commit durable, and reads them back.</summary>
    /// <exception cref="StoreException">store-not-durable, store-unusable.</exception>
    public static Session Open(string path, bool readOnly)
    {
        var connection = new SqliteConnection(new SqliteConnectionStringBuilder
        {
            DataSource = path,
            Mode = SqliteOpenMode.ReadWriteCreate,
            Pooling = false,
            DefaultTimeout = 10,
        }.ToString());
        var session = new Session(connection);
        try
        {
            connection.Open();
            SchemaScripts.RequireOurs(session);
            foreach (var pragma in Sql.Settings)
            {
                session.Execute(pragma);
            }

            RequireDurable(session.One(Sql.JournalMode, row => row.GetString(0)), session.Number(Sql.Synchronous));
            if (readOnly)
            {
                session.Execute(Sql.QueryOnly);
            }

            return session;
        }
        catch (SqliteException problem)
        {
            session.Dispose();
            throw new StoreException(StoreException.Unusable, $"cannot open {path}: {problem.Message}", problem);
        }
        catch
        {
            session.Dispose();
            throw;
        }
    }

    /// <summary>Refuses a connection whose commits may be rolled back by a loss of power.</summary>
    internal static void RequireDurable(string? journalMode, long? synchronous)
    {
        if (journalMode != "wal" || synchronous is not (2 or 3))
        {
            throw new StoreException(StoreException.NotDurable,
                $"journal_mode is {journalMode} and synchronous {synchronous}; wal and 2 (full) are required: use a local file system");
        }
    }

    /// <summary>Runs a statement; the number of rows changed.</summary>
    public int Execute(string sql, params ReadOnlySpan<object?> values) => Bind(sql, values).ExecuteNonQuery();

    /// <summary>First column of the first row as a number; null when there is no row or no value.</summary>
    public long? Number(string sql, params ReadOnlySpan<object?> values) => Bind(sql, values).ExecuteScalar() is long number ? number : null;

    /// <summary>The first row; default when there is none.</summary>
    public T? One<T>(string sql, Func<SqliteDataReader, T> read, params ReadOnlySpan<object?> values)
    {
        using var rows = Bind(sql, values).ExecuteReader();
        return rows.Read() ? read(rows) : default;
    }

    /// <summary>All rows.</summary>
    public List<T> All<T>(string sql, Func<SqliteDataReader, T> read, params ReadOnlySpan<object?> values)
    {
        using var rows = Bind(sql, values).ExecuteReader();
        var all = new List<T>();
        while (rows.Read())
        {
            all.Add(read(rows));
        }

        return all;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        foreach (var command in _commands.Values)
        {
            command.Dispose();
        }

        _connection.Dispose();
    }

    private SqliteCommand Bind(string sql, ReadOnlySpan<object?> values)
    {
        if (!_commands.TryGetValue(sql, out var command))
        {
            command = _connection.CreateCommand();
#pragma warning disable CA2100 // every statement is a constant of Sql or an embedded script
            command.CommandText = sql;
#pragma warning restore CA2100
            for (var i = 1; i <= values.Length; i++)
            {
                command.Parameters.Add(new SqliteParameter { ParameterName = $"${i}" });
            }

            _commands.Add(sql, command);
        }

        for (var i = 0; i < values.Length; i++)
        {
            command.Parameters[i].Value = values[i] ?? DBNull.Value;
        }

        return command;
    }
}
