using Microsoft.Extensions.Options;

namespace RespDerive.Service;

/// <summary>Checks the whole configuration and names every error, not only the first.</summary>
public sealed class OptionsCheck : IValidateOptions<ServiceOptions>
{
    /// <inheritdoc/>
    public ValidateOptionsResult Validate(string? name, ServiceOptions options)
    {
        var errors = Errors(options).ToArray();
        return errors.Length == 0 ? ValidateOptionsResult.Success : ValidateOptionsResult.Fail(errors);
    }

    /// <summary>Each error: key, rule, example.</summary>
    public static IEnumerable<string> Errors(ServiceOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (string.IsNullOrWhiteSpace(options.Site) || options.Site.Length > 64)
        {
            yield return "RespDerive:Site must be 1 to 64 characters, for example icu-north.";
        }

        if (!IsBase(options.Source.Address))
        {
            yield return "RespDerive:Source:Address must be an absolute http or https base, for example https://ehr.example/fhir.";
        }

        if (string.IsNullOrWhiteSpace(options.Source.Name))
        {
            yield return "RespDerive:Source:Name must not be empty, for example ehr.";
        }

        if (options.Delivery.Address is { } target && !IsBase(target))
        {
            yield return "RespDerive:Delivery:Address must be an absolute http or https base, or absent to write to the source.";
        }

        if (options.Intake.Subscribe && !IsBase(options.Intake.Endpoint))
        {
            yield return "RespDerive:Intake:Endpoint must be our address as the source sees it when Subscribe is on, for example https://respderive.example/notify.";
        }

        foreach (var criterion in options.Intake.Searches.Where(criterion => criterion.IndexOf('?', StringComparison.Ordinal) < 1))
        {
            yield return $"RespDerive:Intake:Criteria holds '{criterion}', which is no search such as Observation?code=http://loinc.org|2703-7.";
        }

        if (options.Intake.PollEvery < TimeSpan.Zero || options.Intake.Overlap < TimeSpan.Zero || options.Intake.FirstLookBack < TimeSpan.Zero)
        {
            yield return "RespDerive:Intake:PollEvery, Overlap and FirstLookBack must not be negative, for example 00:01:00.";
        }

        if (options.Intake.PollEvery > TimeSpan.FromDays(1) || options.Intake.Overlap > TimeSpan.FromDays(1) || options.Intake.FirstLookBack > TimeSpan.FromDays(31))
        {
            yield return "RespDerive:Intake:PollEvery and Overlap must be at most 1 day, FirstLookBack at most 31 days; 48 hours are written 2.00:00:00.";
        }

        if (!options.Intake.Subscribe && options.Intake.PollEvery == TimeSpan.Zero)
        {
            yield return "RespDerive:Intake has neither Subscribe nor PollEvery: only what is posted to /notify would come in, and lost notifications would stay lost.";
        }

        if (options.Intake.PageSize is < 1 or > 1000)
        {
            yield return "RespDerive:Intake:PageSize must be 1 to 1000.";
        }

        if (options.Delivery.Parallel is < 1 or > 64)
        {
            yield return "RespDerive:Delivery:Parallel must be 1 to 64.";
        }

        if (!Uri.TryCreate(options.Delivery.Canonical, UriKind.Absolute, out _) || options.Delivery.Canonical.EndsWith('/'))
        {
            yield return "RespDerive:Delivery:Canonical must be an absolute URI without a trailing slash.";
        }

        foreach (var (key, path) in new[] { ("Policy", options.Policy), ("CodeMap", options.CodeMap), ("ModeMap", options.ModeMap) })
        {
            if (path is not null && !File.Exists(path))
            {
                yield return $"RespDerive:{key} names a file that does not exist: {path}";
            }
        }

        if (Path.GetDirectoryName(Path.GetFullPath(options.Store)) is { } folder && !Directory.Exists(folder))
        {
            yield return $"RespDerive:Store lies in a folder that does not exist: {folder}";
        }

        if (options.TimeZone is { } zone && !TimeZoneInfo.TryFindSystemTimeZoneById(zone, out _))
        {
            yield return $"RespDerive:TimeZone '{zone}' is not known here, for example Europe/Berlin.";
        }
    }

    private static bool IsBase(Uri? address) => address is { IsAbsoluteUri: true, Scheme: "http" or "https", Query: "" };
}
