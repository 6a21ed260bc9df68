using RespDerive.Fhir;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Service;

/// <summary>Reads the files a configuration names; every error of every file in one exception.</summary>
internal static class SiteFiles
{
    public static PolicyBook ReadPolicies(ServiceOptions options, Catalogue catalogue)
    {
        if (options.Policy is null)
        {
            return new PolicyBook(PolicyDocument.WithHash(new Policy()));
        }

        using var file = File.OpenRead(options.Policy);
        try
        {
            return PolicyFile.Read(file, catalogue);
        }
        catch (PolicyFileException exception)
        {
            throw new SiteException([.. exception.Errors.Select(error => $"{options.Policy}: {error}")]);
        }
    }

    public static (CodeMap Codes, CodedMap Values) ReadMaps(ServiceOptions options)
    {
        var codes = options.CodeMap is { } codeFile ? SiteMaps.Codes(File.ReadAllText(codeFile)) : null;
        var values = options.ModeMap is { } modeFile ? SiteMaps.Values(File.ReadAllText(modeFile)) : null;
        string[] errors =
        [
            .. codes?.Faults.Select(fault => $"{options.CodeMap}:{fault.Line}: {fault.Text}") ?? [],
            .. values?.Faults.Select(fault => $"{options.ModeMap}:{fault.Line}: {fault.Text}") ?? [],
        ];
        return errors.Length > 0 ? throw new SiteException(errors) : (new CodeMap(codes?.Rows, options.UseSnomed), new CodedMap(values?.Rows));
    }
}
