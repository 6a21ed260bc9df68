using System.Reflection;

namespace RespDerive.Physiology;

/// <summary>The definitions of some assemblies, by key and revision.</summary>
public sealed class Catalogue
{
    private readonly Dictionary<string, Definition> _current = new(StringComparer.Ordinal);
    private readonly Dictionary<(string Key, int Revision), Definition> _all = [];

    /// <summary>Collects every <see cref="Definition"/> of the assemblies.</summary>
    /// <exception cref="InvalidOperationException">Two definitions share key and revision.</exception>
    public Catalogue(params IEnumerable<Assembly> assemblies)
    {
        foreach (var type in assemblies.SelectMany(assembly => assembly.GetTypes()).Where(type => type.IsSubclassOf(typeof(Definition)) && !type.IsAbstract))
        {
            var definition = (Definition)Activator.CreateInstance(type, nonPublic: true)!;
            if (!_all.TryAdd((definition.Key, definition.Revision), definition))
            {
                throw new InvalidOperationException($"Two definitions are called {definition.Key} revision {definition.Revision}.");
            }

            if (!_current.TryGetValue(definition.Key, out var other) || other.Revision < definition.Revision)
            {
                _current[definition.Key] = definition;
            }
        }

        Revisions = [.. _all.Values.OrderBy(definition => definition.Key, StringComparer.Ordinal).ThenBy(definition => definition.Revision)];
        All = [.. _current.Values.OrderBy(definition => definition.Key, StringComparer.Ordinal)];
    }

    /// <summary>The definitions shipped with the service.</summary>
    public static Catalogue Shipped { get; } = new(typeof(Catalogue).Assembly);

    /// <summary>Current revision of each definition, ordered by key.</summary>
    public IReadOnlyList<Definition> All { get; }

    /// <summary>Every revision of each definition, frozen ones too, ordered by key and revision.</summary>
    public IReadOnlyList<Definition> Revisions { get; }

    /// <summary>A definition by key or alias; null when there is none.</summary>
    public Definition? Find(string key) =>
        _current.GetValueOrDefault(key) ?? All.FirstOrDefault(definition => definition.Aliases.Contains(key, StringComparer.Ordinal));

    /// <summary>One revision of a definition; null when there is none.</summary>
    public Definition? Find(string key, int revision) => _all.GetValueOrDefault((key, revision));
}
