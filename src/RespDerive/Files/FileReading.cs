using RespDerive.Fhir;
using RespDerive.Physiology;
using RespDerive.Service;

namespace RespDerive.Files;

/// <summary>A place in a file that could not be read.</summary>
internal sealed record Unreadable(string File, long Line, int? Entry, string Reason)
{
    public override string ToString() => $"{File}:{Line}{(Entry is { } entry ? $" entry {entry}" : "")}: {Reason}";
}

/// <summary>Reads resources from files in the order given; what cannot be read is reported and nothing else is lost.</summary>
internal sealed class FileReading(Site site, TimeProvider time)
{
    private readonly List<Unreadable> _unreadable = [];
    private readonly Dictionary<string, long> _refused = new(StringComparer.Ordinal);

    /// <summary>Lines that are no FHIR JSON.</summary>
    public IReadOnlyList<Unreadable> Unreadable => _unreadable;

    /// <summary>Resources that were understood but are of no use, by reason.</summary>
    public IReadOnlyDictionary<string, long> Refused => _refused;

    /// <summary>Resources read.</summary>
    public long Count { get; private set; }

    /// <summary>The facts of every resource; "-" is standard input.</summary>
    public async IAsyncEnumerable<ResourceFacts> ReadAsync(IEnumerable<string> files, [System.Runtime.CompilerServices.EnumeratorCancellation] CancellationToken cancel)
    {
        foreach (var file in files)
        {
            await using var stream = file == "-" ? Console.OpenStandardInput() : File.OpenRead(file);
            await foreach (var item in ResourceFile.Read(stream, cancel))
            {
                var result = item.Refused is null
                    ? FactReader.Read(item.Utf8, site.Source, site.SourceBase, item.FullUrl, time.GetUtcNow(), item.Links)
                    : new FactResult(null, item.Refused);
                if (result.Facts is { } facts && !site.IsOwn(facts))
                {
                    if (facts.LacksPatient)
                    {
                        Refuse(Withheld.NoPatient);
                    }
                    else
                    {
                        Count++;
                    }

                    yield return facts;
                }
                else if (result.Refused is Refusals.NotJson or Refusals.NotFhir)
                {
                    _unreadable.Add(new(file, item.Line, item.Entry, result.Refused));
                }
                else
                {
                    Refuse(result.Refused ?? "own-output");
                }
            }
        }
    }

    private void Refuse(string reason) => _refused[reason] = _refused.GetValueOrDefault(reason) + 1;
}
