namespace RespDerive.Sandbox.Endpoint;

/// <summary>A request that is answered with an error: HTTP status, FHIR issue type and a sentence.</summary>
internal sealed class Refusal(int status, string issue, string text) : Exception(text)
{
    public int Status => status;
    public string Issue => issue;

    public static Refusal Malformed(string text) => new(400, "structure", text);
    public static Refusal BadRequest(string text) => new(400, "invalid", text);
    public static Refusal NotFound(string what) => new(404, "not-found", $"{what} is not known here");
    public static Refusal Gone(string what) => new(410, "deleted", $"{what} was deleted");
    public static Refusal Precondition(string text) => new(412, "conflict", text);
    public static Refusal Invalid(string text) => new(422, "invalid", text);
}
