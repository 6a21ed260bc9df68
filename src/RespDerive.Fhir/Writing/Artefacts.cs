using System.Globalization;
using Hl7.Fhir.Model;
using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Writing;

/// <summary>What results point at: our Device, and the documents of definitions and policies.</summary>
internal sealed class Artefacts(RenderOptions options, Vocabulary words)
{
    private Guid DeviceId => NameBasedUuid.Of(NameBasedUuid.Root, "device", options.SoftwareVersion);

    /// <summary>Literal once the id is ours or known, and always the identifier.</summary>
    public ResourceReference DeviceReference() => new()
    {
        Reference = options.DeviceId is { } known ? $"Device/{known}" : options.UsePutIds ? $"Device/{DeviceId}" : null,
        Type = "Device",
        Identifier = new Identifier(words.Device, DeviceId.ToString()),
        Display = $"RespDerive {options.SoftwareVersion} (software)",
    };

    public Device Device() => new()
    {
        Id = options.UsePutIds ? DeviceId.ToString() : null,
        Identifier = [new Identifier(words.Device, DeviceId.ToString())],
        Status = Hl7.Fhir.Model.Device.FHIRDeviceStatus.Active,
        DeviceName = [new Device.DeviceNameComponent { Name = "RespDerive", Type = DeviceNameType.UserFriendlyName }],
        Type = new CodeableConcept { Text = "Software that derives respiratory values from charted observations" },
        Version = [new Device.VersionComponent { Value = options.SoftwareVersion }],
    };

    public Library Definition(Definition definition)
    {
        var library = Document(DefinitionDocument.Of(definition), "logic-library", "Logic Library");
        library.Url = words.Definition(definition.Key);
        library.Version = definition.Revision.ToString(CultureInfo.InvariantCulture);
        library.Name = string.Concat(definition.Key.Split('-').Select(part => char.ToUpperInvariant(part[0]) + part[1..]));
        library.Title = definition.Result.Name;
        library.Description = new Markdown($"{definition.Summary} {definition.Equation}. {definition.Assumptions}");
        return library;
    }

    public Library Policy(Policy policy)
    {
        var library = Document(PolicyDocument.Of(policy), "asset-collection", "Asset Collection");
        library.Url = words.Policy;
        library.Version = library.Id;
        library.Name = "SitePolicy";
        library.Title = $"Policy of the site {options.Site}";
        library.Description = new Markdown("The site's settings that change derived numbers.");
        return library;
    }

    private Library Document(byte[] content, string type, string display)
    {
        var hash = CanonicalJson.Hash(content);
        return new Library
        {
            Id = hash,
            Identifier = [new Identifier(words.Document, hash)],
            Status = PublicationStatus.Active,
            Type = new CodeableConcept(Vocabulary.LibraryType, type, display, null),
            Content = [new Attachment { ContentType = "application/json", Data = content }],
        };
    }
}
