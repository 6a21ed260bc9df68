using System.Text.Json;
using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Writing;

/// <summary>A policy file that cannot be used; every fault found, each with its place.</summary>
public sealed class PolicyFileException(IReadOnlyList<string> errors) : Exception(string.Join(Environment.NewLine, errors))
{
    /// <summary>One line each: place, then what is wrong.</summary>
    public IReadOnlyList<string> Errors => errors;
}

/// <summary>
/// Reads the site policy: JSON, comments and trailing commas allowed, unknown and repeated keys refused.
/// The settings at the top are in force from the beginning; each entry of <c>policies</c> repeats only what changes at its <c>validFrom</c>.
/// </summary>
public static class PolicyFile
{
    private static readonly JsonDocumentOptions Lenient = new() { CommentHandling = JsonCommentHandling.Skip, AllowTrailingCommas = true, AllowDuplicateProperties = false };

    /// <summary>Reads a file; every policy carries its hash.</summary>
    /// <param name="file">The file.</param>
    /// <param name="catalogue">Definitions that may be named; null = the shipped ones.</param>
    /// <exception cref="PolicyFileException">One or more faults.</exception>
    public static PolicyBook Read(Stream file, Catalogue? catalogue = null)
    {
        var errors = new List<string>();
        try
        {
            using var json = JsonDocument.Parse(file, Lenient);
            var policies = Policies(json.RootElement, new PolicyReader(catalogue ?? Catalogue.Shipped, errors), errors);
            return errors.Count == 0 ? new PolicyBook(policies.Select(PolicyDocument.WithHash)) : throw new PolicyFileException(errors);
        }
        catch (JsonException exception)
        {
            throw new PolicyFileException([$"line {(exception.LineNumber ?? 0) + 1}: not valid JSON, or a key given twice"]);
        }
    }

    private static List<Policy> Policies(JsonElement root, PolicyReader reader, List<string> errors)
    {
        var all = new List<Policy>();
        if (root.ValueKind != JsonValueKind.Object)
        {
            errors.Add("the file: must be a JSON object");
            return all;
        }

        var top = reader.Read(root, new Policy(), "", "policies");
        var hasLater = root.TryGetProperty("policies", out var later);
        if (!hasLater || root.EnumerateObject().Any(member => member.Name != "policies"))
        {
            all.Add(top);
        }

        if (hasLater && later.ValueKind != JsonValueKind.Array)
        {
            errors.Add("policies: must be a list");
        }
        else if (hasLater)
        {
            foreach (var (entry, i) in later.EnumerateArray().Select((entry, i) => (entry, i)))
            {
                var policy = reader.Read(entry, top with { ValidFrom = null }, $"policies[{i}].", null);
                if (policy.ValidFrom is { } from && all.Exists(other => other.ValidFrom == from))
                {
                    errors.Add($"policies[{i}].validFrom: the same moment as an entry before it");
                }

                if (policy.ValidFrom is null && !errors.Exists(error => error.StartsWith($"policies[{i}].validFrom", StringComparison.Ordinal)))
                {
                    errors.Add($"policies[{i}].validFrom: missing");
                }

                all.Add(policy);
            }
        }

        return all;
    }
}
