using System.Globalization;
using System.Text.Json.Nodes;
using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>
/// All versions of all resources. One lock makes every <see cref="Write"/> atomic: it commits whole,
/// or its versions are taken back; committed versions are announced in order while the lock is held.
/// </summary>
internal sealed class ResourceStore(TimeProvider clock, Faults faults)
{
    private readonly Lock _gate = new();
    private readonly Dictionary<string, Dictionary<string, List<StoredVersion>>> _types = new(StringComparer.Ordinal);
    private readonly Dictionary<(string Type, string Key), HashSet<string>> _shortcuts = [];
    private readonly List<StoredVersion> _uncommitted = [];
    private DateTimeOffset _last = DateTimeOffset.MinValue;
    private long _nextId = 1000;
    private int _depth;

    public Action<StoredVersion> Committed { get; set; } = _ => { };

    public T Write<T>(Func<T> work)
    {
        lock (_gate)
        {
            // A write inside a write (an entry of a transaction) joins the outer one.
            _depth++;
            T result;
            try
            {
                result = work();
            }
            catch when (_depth == 1)
            {
                TakeBack();
                throw;
            }
            finally
            {
                _depth--;
            }
            if (_depth == 0)
            {
                Announce();
            }
            return result;
        }
    }

    public T Read<T>(Func<T> work)
    {
        lock (_gate)
        {
            return work();
        }
    }

    public StoredVersion? Current(string type, string id) => History(type, id) is { Count: > 0 } all ? all[^1] : null;

    public IReadOnlyList<StoredVersion> History(string type, string id) =>
        _types.TryGetValue(type, out var ids) && ids.TryGetValue(id, out var versions) ? versions : [];

    /// <summary>Adds the next version; no resource means a deletion. Only inside <see cref="Write"/>.</summary>
    public StoredVersion Append(string type, string id, string method, JsonObject? resource)
    {
        if (!_types.TryGetValue(type, out var ids))
        {
            _types.Add(type, ids = new(StringComparer.Ordinal));
        }
        if (!ids.TryGetValue(id, out var versions))
        {
            ids.Add(id, versions = []);
        }
        var number = versions.Count + 1;
        var now = clock.GetUtcNow();
        var at = NextInstant(now);
        var index = resource is null ? SearchIndex.Empty : SearchIndex.Of(type, resource);
        var version = new StoredVersion(type, id, number, at, now, method, resource is null ? null : ResourceJson.Stamp(resource, id, number, at), index);
        versions.Add(version);
        foreach (var key in index.Shortcuts)
        {
            (_shortcuts.TryGetValue((type, key), out var found) ? found : _shortcuts[(type, key)] = []).Add(id);
        }
        _uncommitted.Add(version);
        return version;
    }

    public string NewId(string type)
    {
        string id;
        do
        {
            id = (_nextId++).ToString(CultureInfo.InvariantCulture);
        }
        while (Current(type, id) is not null);
        return id;
    }

    /// <summary>Current matches in commit order. With <paramref name="stale"/>, as old as the fault says.</summary>
    public List<StoredVersion> Find(SearchQuery query, bool stale = false)
    {
        var age = stale ? faults.SearchStaleness : TimeSpan.Zero;
        var now = clock.GetUtcNow();
        var found = new List<StoredVersion>();
        foreach (var versions in Candidates(query))
        {
            var seen = age == TimeSpan.Zero ? versions[^1] : versions.FindLast(v => now - v.CommittedAt >= age);
            if (seen is { Deleted: false } && query.Matches(seen))
            {
                found.Add(seen);
            }
        }
        query.Order(found);
        return found;
    }

    private IEnumerable<List<StoredVersion>> Candidates(SearchQuery query)
    {
        if (!_types.TryGetValue(query.Type, out var ids))
        {
            return [];
        }
        if (query.Ids is { } wanted)
        {
            return wanted.Where(ids.ContainsKey).Select(id => ids[id]);
        }
        return query.Shortcut is { } key
            ? _shortcuts.TryGetValue((query.Type, key), out var known) ? known.Where(ids.ContainsKey).Select(id => ids[id]) : []
            : ids.Values;
    }

    // R4 asks only for second precision; here every write has its own millisecond, so that paging by time is exact.
    private DateTimeOffset NextInstant(DateTimeOffset now)
    {
        var whole = new DateTimeOffset(now.UtcTicks - (now.UtcTicks % TimeSpan.TicksPerMillisecond), TimeSpan.Zero);
        return _last = whole > _last ? whole : _last.AddMilliseconds(1);
    }

    private void Announce()
    {
        var committed = _uncommitted.ToArray();
        _uncommitted.Clear();
        foreach (var version in committed)
        {
            Committed(version);
        }
    }

    private void TakeBack()
    {
        for (var i = _uncommitted.Count - 1; i >= 0; i--)
        {
            var (type, id) = (_uncommitted[i].Type, _uncommitted[i].Id);
            var versions = _types[type][id];
            versions.RemoveAt(versions.Count - 1);
            if (versions.Count == 0)
            {
                _types[type].Remove(id);
            }
        }
        _uncommitted.Clear();
    }
}
