using Hl7.Fhir.Model;
using RespDerive.Physiology;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Writing;

/// <summary>
/// Turns outcomes into FHIR R4 resources. Pure: no clock, no state; the same outcome and edition give the same bytes.
/// </summary>
/// <remarks>For a retraction pass the outcome as last published: its evidence is kept, its number dropped.</remarks>
public sealed class ResultRenderer
{
    private readonly Catalogue _catalogue;
    private readonly RenderOptions _options;
    private readonly ObservationForm _observations;
    private readonly ProvenanceForm _provenances;
    private readonly Artefacts _artefacts;

    /// <summary>A renderer for the definitions of <paramref name="catalogue"/>.</summary>
    public ResultRenderer(Catalogue catalogue, RenderOptions options)
    {
        (_catalogue, _options, Words) = (catalogue, options, new Vocabulary(options.Base));
        var references = new References(options, Words);
        _observations = new ObservationForm(catalogue, options, Words, references);
        _provenances = new ProvenanceForm(options, Words, references, _observations);
        _artefacts = new Artefacts(options, Words);
    }

    /// <summary>The URIs used.</summary>
    public Vocabulary Words { get; }

    /// <summary>Query part that finds a result by our identifier; ASCII, encoded.</summary>
    public string IdentifierQuery(Guid identity) => TransactionForm.Query(Words.Result, identity.ToString());

    /// <summary>The Observation of one edition.</summary>
    /// <exception cref="ArgumentException">The outcome has no value and the edition is no retraction, or its definition is not in the catalogue.</exception>
    public Observation Observation(Outcome outcome, Edition edition) => _observations.Of(outcome, DefinitionOf(outcome), edition, _artefacts.DeviceReference());

    /// <summary>The Provenance of one edition.</summary>
    /// <param name="outcome">The outcome.</param>
    /// <param name="edition">The edition.</param>
    /// <param name="targetReference">Reference of the Observation without version: <c>Observation/id</c>, or <c>urn:uuid:…</c> inside a transaction.</param>
    public Provenance Provenance(Outcome outcome, Edition edition, string targetReference) =>
        Provenance(outcome, edition, targetReference, Observation(outcome, edition));

    /// <summary>Our Device: one for each software version.</summary>
    public Device Device() => _artefacts.Device();

    /// <summary>A site policy as a Library: its id is the hash, its content the document.</summary>
    public Library Policy(Policy policy) => _artefacts.Policy(policy);

    /// <summary>A revision of a definition as a Library: its id is the hash, its content the document.</summary>
    public Library Definition(Definition definition) => _artefacts.Definition(definition);

    /// <summary>
    /// One transaction: the Observation, its Provenance, our Device while its server id is unknown, and what else must exist first.
    /// At most six entries, since servers limit conditional ones.
    /// </summary>
    /// <param name="outcome">The outcome.</param>
    /// <param name="edition">Without a server id and version: created, conditionally unless we write under our own ids. With: updated under If-Match.</param>
    /// <param name="first">Libraries not yet at the server, created conditionally; at most three.</param>
    /// <exception cref="ArgumentException">Too many entries, or a later edition without the server's id and version.</exception>
    public Bundle Transaction(Outcome outcome, Edition edition, params IReadOnlyList<Library> first)
    {
        var form = new TransactionForm(_options, Words, edition);
        var device = _options.DeviceId is null ? Device() : null;
        var observation = Observation(outcome, edition);
        var provenance = Provenance(outcome, edition, form.Target(outcome.Identity), observation);
        if (device is not null && !_options.UsePutIds)
        {
            // The server gives the id, so both point at the entry; the identifier stays beside it.
            var entry = TransactionForm.EntryUrl(device.Identifier[0]);
            provenance.Agent[0].Who.Reference = entry;
            observation.Device?.Reference = entry;
        }

        return form.Of(observation, provenance, device, first);
    }

    private Provenance Provenance(Outcome outcome, Edition edition, string target, Observation observation) =>
        _provenances.Of(outcome, DefinitionOf(outcome), edition, target, _artefacts.DeviceReference(), ContentDigest.Of(observation));

    private Definition DefinitionOf(Outcome outcome) => _catalogue.Find(outcome.Definition, outcome.Revision)
        ?? throw new ArgumentException($"The catalogue has no {outcome.Definition} revision {outcome.Revision}.", nameof(outcome));
}
