using RespDerive.Physiology;

namespace RespDerive.Docs;

/// <summary>Definitions that a picture makes plainer; drawn apart, since the service ships no plotting library.</summary>
internal static class Pictures
{
    private static readonly Dictionary<string, string> Captions = new(StringComparer.Ordinal)
    {
        ["aa-gradient"] = "Difference at one arterial-to-alveolar ratio, over the inspired fraction: it rises though the lung is the same.",
        ["so2-severinghaus"] = "Saturation over tension at three pH values.",
        ["minimum-work-rate"] = "Work of breathing per minute over rate at one alveolar ventilation; the least is where the curve is lowest.",
    };

    /// <summary>Caption of the picture of a definition; null when it has none.</summary>
    public static string? Caption(Definition definition) => Captions.GetValueOrDefault(definition.Key);
}
