using System.Text.Json;
using Microsoft.Data.Sqlite;
using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>How values stand in columns.</summary>
internal static class Columns
{
    // least in the total order of versions, as a missing part has to be
    private const long Missing = long.MinValue;

    private static readonly Dictionary<string, string> NoLinks = [];

    public static long Updated(VersionOrder order) => order.LastUpdated?.UtcTicks ?? Missing;

    public static long Number(VersionOrder order) => order.Number ?? Missing;

    public static VersionOrder Order(SqliteDataReader row, int updated) => new(
        row.GetInt64(updated) is var ticks and not Missing ? Time(ticks) : null,
        row.GetInt64(updated + 1) is var number and not Missing ? number : null,
        row.GetString(updated + 2));

    public static DateTimeOffset Time(long ticks) => new(ticks, TimeSpan.Zero);

    public static long? OptionalNumber(SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetInt64(column);

    public static string? OptionalText(SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetString(column);

    public static byte[]? OptionalBytes(SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetFieldValue<byte[]>(column);

    public static string Identity(Guid identity) => identity.ToString("D");

    public static ResourceBody Body(SqliteDataReader row) => new()
    {
        Key = new ResourceKey(row.GetString(0), row.GetString(1), row.GetString(2)),
        Base = row.GetString(3),
        Version = row.GetString(4),
        Order = Order(row, 5),
        Patient = OptionalText(row, 8),
        Body = row.GetFieldValue<byte[]>(9),
        Arrived = Time(row.GetInt64(10)),
        Gone = row.GetInt64(11) == 1,
        Links = Links(OptionalText(row, 12)),
    };

    /// <summary>Links as a JSON object; null when there are none.</summary>
    public static string? Text(IReadOnlyDictionary<string, string> links) =>
        links.Count == 0 ? null : JsonSerializer.Serialize(links, RecordsJson.Default.IReadOnlyDictionaryStringString);

    private static IReadOnlyDictionary<string, string> Links(string? text) =>
        text is null ? NoLinks : JsonSerializer.Deserialize(text, RecordsJson.Default.IReadOnlyDictionaryStringString)!;
}
