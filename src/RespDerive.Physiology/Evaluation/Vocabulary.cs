using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>What a name means when values are given by hand: keys, aliases and symbols, case-sensitive.</summary>
/// <remarks>
/// The definition's own symbols come first, then the kinds it uses in order of preference, then every other kind,
/// so that VE is the measured minute volume to one definition and the computed one to another.
/// </remarks>
internal sealed class Vocabulary
{
    private readonly Dictionary<string, Kind> _names = new(StringComparer.Ordinal);

    public Vocabulary(Definition definition, Catalogue catalogue)
    {
        Usable = Chain.Slots(definition).SelectMany(slot => slot.Kinds)
            .Concat(definition.Watched)
            .Concat(definition.Gates.SelectMany(gate => gate.ReadsByHand))
            .ToHashSet();
        foreach (var (symbol, kind) in definition.Symbols)
        {
            _names[symbol] = kind;
        }

        foreach (var kind in Usable.Concat(Kinds.All).Concat(catalogue.All.Select(other => other.Result)))
        {
            _names.TryAdd(kind.Key, kind);
            _names.TryAdd(kind.Symbol, kind);
        }

        foreach (var other in catalogue.All)
        {
            foreach (var alias in other.Aliases)
            {
                _names.TryAdd(alias, other.Result);
            }
        }
    }

    /// <summary>Kinds that the definition, or one of its gates or flag rules, can use.</summary>
    public IReadOnlySet<Kind> Usable { get; }

    /// <summary>The kind of a name.</summary>
    /// <exception cref="UnusableRequestException">No such name; the message lists near ones.</exception>
    public Kind Find(string name) => _names.GetValueOrDefault(name) ?? throw new UnusableRequestException(
        NearNames.To(name, _names.Keys) is { Count: > 0 } near
            ? $"'{name}' is not a known input (names are case-sensitive). Near: {string.Join(", ", near)}."
            : $"'{name}' is not a known input (names are case-sensitive).");
}
