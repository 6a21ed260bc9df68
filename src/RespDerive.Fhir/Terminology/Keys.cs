using System.Collections.Frozen;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>What a code can mean, and what the same code means when the device metric or the specimen says more.</summary>
/// <param name="Name">The key.</param>
/// <param name="Broader">Keys that say the same less exactly; beside this one they are no contradiction.</param>
/// <param name="WhenSetting">Key when the DeviceMetric is a setting; empty when it makes no difference.</param>
/// <param name="WhenMeasurement">Key when the DeviceMetric is a measurement.</param>
/// <param name="WhenArterial">Key when the specimen is arterial; only for keys that leave the site of the sample open.</param>
internal sealed record Key(string Name, IReadOnlyList<string> Broader, string WhenSetting, string WhenMeasurement, string WhenArterial)
{
    /// <summary>The kind; null for a key that is recognised only to be kept apart.</summary>
    public Kind? Kind { get; } = Kinds.Find(Name) ?? Events.All.FirstOrDefault(kind => kind.Key == Name);

    /// <summary>True when it is a kind, or can become one by what the metric, the specimen or the category says.</summary>
    public bool CanBeRead => Kind is not null || Name == Meaning.Saturation || IsKind(WhenSetting) || IsKind(WhenMeasurement) || IsKind(WhenArterial);

    /// <summary>True for a key that another key turns into when the specimen is arterial.</summary>
    public bool IsArterial => Keys.Arterial.Contains(Name);

    private static bool IsKind(string name) => name.Length > 0 && Keys.Find(name)?.Kind is not null;
}

/// <summary>All keys.</summary>
internal static class Keys
{
    /// <summary>In a site's map: this code is not for us, whatever the shipped tables say.</summary>
    public const string None = "none";

    private static readonly FrozenDictionary<string, Key> ByName = Tables.Rows("keys.tsv")
        .Select(row => new Key(row[0], row[1].Split(' ', StringSplitOptions.RemoveEmptyEntries), row[2], row[3], row[4]))
        .ToFrozenDictionary(key => key.Name, StringComparer.Ordinal);

    public static FrozenSet<string> Arterial { get; } =
        ByName.Values.Select(key => key.WhenArterial).Where(name => name.Length > 0).ToFrozenSet(StringComparer.Ordinal);

    public static IEnumerable<Key> All => ByName.Values;

    /// <summary>A key of the table, or a kind that has no row there; null when neither.</summary>
    public static Key? Find(string name) => ByName.TryGetValue(name, out var key) ? key
        : new Key(name, [], "", "", "") is { Kind: not null } bare ? bare : null;
}
