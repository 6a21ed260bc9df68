using System.Text.Json;
using System.Text.Json.Nodes;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary>Computations as a stream: one JSON request a line, one JSON answer a line, in the same order.</summary>
internal static class ComputeLines
{
    /// <summary>Answers every line until the end; a line that cannot be used is answered with <c>error</c> and the rest go on.</summary>
    /// <returns><see cref="Exit.Data"/> when any line could not be used.</returns>
    public static Task<int> RunAsync(TextReader input, TextWriter output, CancellationToken cancel) => RunAsync(Catalogue.Shipped, input, output, cancel);

    /// <summary>The same with the definitions of another catalogue.</summary>
    public static async Task<int> RunAsync(Catalogue catalogue, TextReader input, TextWriter output, CancellationToken cancel)
    {
        var code = Exit.Ok;
        while (await input.ReadLineAsync(cancel) is { } line)
        {
            if (string.IsNullOrWhiteSpace(line))
            {
                continue;
            }

            var answer = Answer(catalogue, line);
            code = answer.ContainsKey("error") ? Exit.Data : code;
            await output.WriteLineAsync(OutputOption.Line(answer).AsMemory(), cancel);
            await output.FlushAsync(cancel);
        }

        return code;
    }

    private static JsonObject Answer(Catalogue catalogue, string line)
    {
        JsonNode? id = null;
        string? definition = null;
        try
        {
            using var document = JsonDocument.Parse(line);
            var request = document.RootElement;
            if (request.ValueKind != JsonValueKind.Object)
            {
                throw new UnusableRequestException("The line is not a JSON object.");
            }

            id = request.TryGetProperty("id", out var given) ? JsonNode.Parse(given.GetRawText()) : null;
            definition = request.TryGetProperty("definition", out var key) && key.ValueKind == JsonValueKind.String
                ? key.GetString()
                : throw new UnusableRequestException("The request names no definition.");
            if (!request.TryGetProperty("inputs", out var inputs) || inputs.ValueKind != JsonValueKind.Object)
            {
                throw new UnusableRequestException("The request has no object 'inputs'.");
            }

            return ComputeJson.Of(ByHand.Compute(ComputeRequest.Definition(catalogue, definition!), inputs.EnumerateObject().Select(ComputeRequest.Member), catalogue), id);
        }
        catch (Exception wrong) when (wrong is UnusableRequestException or JsonException)
        {
            return ComputeJson.Error(id, definition, wrong is JsonException ? "The line is not valid JSON." : wrong.Message);
        }
    }
}
