using System.Text.Json;
using System.Text.Json.Serialization;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>Readings, persons and outcomes as bytes.</summary>
internal sealed class Records(Func<string, Kind?> kinds)
{
    private readonly RecordsJson _json = new(Options(kinds));

    public bool Knows(string kind) => kinds(kind) is not null;

    public byte[] Bytes(Reading reading) => JsonSerializer.SerializeToUtf8Bytes(reading, _json.Reading);

    public byte[] Bytes(Person person) => JsonSerializer.SerializeToUtf8Bytes(person, _json.Person);

    public byte[] Bytes(Outcome outcome) => JsonSerializer.SerializeToUtf8Bytes(outcome, _json.Outcome);

    public Reading Reading(byte[] bytes) => JsonSerializer.Deserialize(bytes, _json.Reading)!;

    public Person Person(byte[] bytes) => JsonSerializer.Deserialize(bytes, _json.Person)!;

    public Outcome Outcome(byte[] bytes) => JsonSerializer.Deserialize(bytes, _json.Outcome)!;

    private static JsonSerializerOptions Options(Func<string, Kind?> kinds)
    {
        var options = new JsonSerializerOptions(RecordsJson.Default.Options);
        options.Converters.Insert(0, new KindConverter(kinds));
        return options;
    }
}

/// <summary>
/// Generated serialisers. Only nulls are left out: a property missing in a row is read as null or zero, not as its initial
/// value, so a new one needs a schema script that fills it into the rows (a test holds the list).
/// </summary>
[JsonSourceGenerationOptions(
    DefaultIgnoreCondition = JsonIgnoreCondition.WhenWritingNull,
    IgnoreReadOnlyProperties = true,
    NumberHandling = JsonNumberHandling.AllowNamedFloatingPointLiterals,
    Converters = [typeof(KindConverter)])]
[JsonSerializable(typeof(Reading))]
[JsonSerializable(typeof(Person))]
[JsonSerializable(typeof(Outcome))]
[JsonSerializable(typeof(IReadOnlyDictionary<string, string>))]
internal sealed partial class RecordsJson : JsonSerializerContext;

/// <summary>A kind as its key.</summary>
internal sealed class KindConverter(Func<string, Kind?> kinds) : JsonConverter<Kind>
{
    /// <summary>For the generated code only; <see cref="Records"/> puts one with the caller's kinds in its place.</summary>
    public KindConverter() : this(Kinds.Find)
    {
    }

    /// <inheritdoc/>
    public override Kind Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
        reader.GetString() is { } key && kinds(key) is { } kind ? kind : throw new JsonException("unknown kind");

    /// <inheritdoc/>
    public override void Write(Utf8JsonWriter writer, Kind value, JsonSerializerOptions options) => writer.WriteStringValue(value.Key);
}
