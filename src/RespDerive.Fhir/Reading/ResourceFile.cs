using System.Buffers;
using System.Runtime.CompilerServices;

namespace RespDerive.Fhir;

/// <summary>One resource of a file, not yet read; or a place where none could be.</summary>
/// <param name="Line">Line of the file, counted from 1; the first one of a document that spans lines.</param>
/// <param name="Entry">Entry of a Bundle, counted from 0; null outside a Bundle.</param>
/// <param name="Utf8">The resource; empty when refused.</param>
/// <param name="FullUrl">Address of the entry.</param>
/// <param name="Links">References of the entries of the same Bundle by their URNs.</param>
/// <param name="Refused">One of <see cref="Refusals"/>; null when there is a resource.</param>
public sealed record FiledResource(long Line, int? Entry, ReadOnlyMemory<byte> Utf8, string? FullUrl,
    IReadOnlyDictionary<string, string> Links, string? Refused);

/// <summary>
/// The resources of a file: NDJSON, of which only one line is held at a time, or one JSON document. Bundles, whole or one
/// a line, are taken apart. What cannot be read is reported in its place and the rest goes on.
/// </summary>
public static class ResourceFile
{
    private const int ChunkSize = 64 * 1024;

    private readonly record struct Line(long Number, ReadOnlyMemory<byte> Text);

    /// <summary>Reads to the end of the stream.</summary>
    public static async IAsyncEnumerable<FiledResource> Read(Stream stream, [EnumeratorCancellation] CancellationToken cancellation = default)
    {
        // Until a line is a whole resource, the lines may be those of one document.
        var held = new List<Line>();
        var isLines = false;
        await foreach (var line in Lines(stream, cancellation).ConfigureAwait(false))
        {
            isLines = isLines || IsResource(line.Text);
            held.Add(line);
            if (isLines)
            {
                foreach (var item in held.SelectMany(Items))
                {
                    yield return item;
                }

                held.Clear();
            }
        }

        foreach (var item in held.Count == 0 ? [] : Items(Joined(held)))
        {
            yield return item;
        }
    }

    private static List<FiledResource> Items(Line line)
    {
        using var document = Json.Parse(line.Text);
        return document is null ? [new(line.Number, null, default, null, Bundles.NoLinks, Refusals.NotJson)]
            : Bundles.IsBundle(document.RootElement) ? [.. Bundles.Entries(line.Number, document.RootElement)]
            : [new(line.Number, null, line.Text, null, Bundles.NoLinks, null)];
    }

    private static Line Joined(List<Line> lines)
    {
        var whole = new ArrayBufferWriter<byte>();
        foreach (var line in lines)
        {
            whole.Write(line.Text.Span);
            whole.Write("\n"u8);
        }

        return new(lines[0].Number, whole.WrittenMemory);
    }

    /// <summary>Looks at the ends first: parsing every line of a long document in vain would be slow.</summary>
    private static bool IsResource(ReadOnlyMemory<byte> text)
    {
        var span = text.Span.TrimEnd(" \t\r"u8);
        if (span.Length < 2 || span[0] != '{' || span[^1] != '}')
        {
            return false;
        }

        using var document = Json.Parse(text);
        return document?.RootElement.Text("resourceType") is not null;
    }

    /// <summary>Lines that are not blank, without the byte-order mark.</summary>
    private static async IAsyncEnumerable<Line> Lines(Stream stream, [EnumeratorCancellation] CancellationToken cancellation)
    {
        var chunk = new byte[ChunkSize];
        var pending = new ArrayBufferWriter<byte>();
        var number = 1L;
        int count;
        while ((count = await stream.ReadAsync(chunk, cancellation).ConfigureAwait(false)) > 0)
        {
            var rest = chunk.AsMemory(0, count);
            while (rest.Span.IndexOf((byte)'\n') is var end and >= 0)
            {
                pending.Write(rest.Span[..end]);
                rest = rest[(end + 1)..];
                if (Take(pending) is { } text)
                {
                    yield return new(number, text);
                }

                number++;
            }

            pending.Write(rest.Span);
        }

        if (Take(pending) is { } last)
        {
            yield return new(number, last);
        }
    }

    private static ReadOnlyMemory<byte>? Take(ArrayBufferWriter<byte> pending)
    {
        var text = Json.WithoutMark(pending.WrittenSpan.ToArray());
        pending.ResetWrittenCount();
        return text.Span.IndexOfAnyExcept(" \t\r"u8) >= 0 ? text : default(ReadOnlyMemory<byte>?);
    }
}
