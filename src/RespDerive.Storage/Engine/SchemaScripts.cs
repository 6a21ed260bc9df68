using System.Globalization;
using Microsoft.Data.Sqlite;

namespace RespDerive.Storage;

/// <summary>Brings a file to the schema of this software; forward only, one transaction per script.</summary>
internal static class SchemaScripts
{
    /// <summary>"RDRV": marks the file as ours.</summary>
    internal const long ApplicationId = 0x52445256;

    /// <summary>Applies the scripts that the file does not have yet.</summary>
    /// <exception cref="StoreException">store-unusable, store-newer-than-software.</exception>
    public static void Apply(Session session)
    {
        try
        {
            session.Execute(Sql.SetApplicationId + ApplicationId.ToString(CultureInfo.InvariantCulture));
            session.Execute(Sql.CreateSchemaVersion);
            var scripts = Scripts();
            var have = session.Number(Sql.SchemaVersion) ?? 0;
            if (have > scripts.Count)
            {
                throw new StoreException(StoreException.NewerThanSoftware,
                    $"the store has schema {have}, this software knows {scripts.Count}: start the newer software again");
            }

            for (var version = have + 1; version <= scripts.Count; version++)
            {
                session.Execute(Sql.Begin);
                session.Execute(scripts[(int)version - 1]);
                session.Execute(Sql.SetSchemaVersion, version);
                session.Execute(Sql.Commit);
            }
        }
        catch (SqliteException problem)
        {
            throw new StoreException(StoreException.Unusable, $"cannot use the store: {problem.Message}", problem);
        }
    }

    /// <summary>Refuses a file that another program wrote, before anything in it is changed.</summary>
    /// <exception cref="StoreException">store-unusable.</exception>
    public static void RequireOurs(Session session)
    {
        var application = session.Number(Sql.ApplicationId);
        if (application != ApplicationId && (application != 0 || session.Number(Sql.TableCount) > 0))
        {
            throw new StoreException(StoreException.Unusable, "the file belongs to another program");
        }
    }

    private static List<string> Scripts()
    {
        var assembly = typeof(SchemaScripts).Assembly;
        return [.. assembly.GetManifestResourceNames().Where(name => name.EndsWith(".sql", StringComparison.Ordinal)).Order(StringComparer.Ordinal).Select(name =>
        {
            using var reader = new StreamReader(assembly.GetManifestResourceStream(name)!);
            return reader.ReadToEnd();
        })];
    }
}
