using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>From the facts of one resource version to its readings. Pure: the same facts and set give the same readings.</summary>
public sealed class ReadingRules
{
    private readonly CodeMap _codes;
    private readonly ReadingOptions _options;
    private readonly Meaning _meaning;
    private readonly Quantities _quantities;

    /// <summary>Rules of a site.</summary>
    public ReadingRules(CodeMap codes, ReadingOptions options)
    {
        (_codes, _options) = (codes, options);
        _meaning = new(codes);
        _quantities = new(options.Values, options.Fio2PercentRepair);
    }

    /// <summary>Reads one version.</summary>
    /// <param name="facts">Its facts.</param>
    /// <param name="set">Where its references are looked up.</param>
    public ReadResult Read(ResourceFacts facts, IResourceSet set) => facts.Content switch
    {
        ObservationFacts observation => Observation(facts, observation, set),
        PatientFacts patient => new() { Person = Persons.Read(facts, patient) },
        EncounterFacts encounter => End(facts, Events.EncounterEnd, encounter.Status, encounter.Status == "finished", encounter.End, facts.Key.Reference),
        ProcedureFacts procedure when procedure.Codes.Any(code => _codes.Of(code) == Events.SupportEnd.Key) =>
            End(facts, Events.SupportEnd, procedure.Status, procedure.Status is "completed" or "stopped",
                procedure.Performed is { IsPeriod: true } period ? period.End : null, procedure.Encounter),
        SpecimenFacts { Status: var status } => new() { Withdrawn = Persons.IsWithdrawn(status) },
        ReportFacts { Status: var status } => new() { Withdrawn = Persons.IsWithdrawn(status) },
        _ => new(),
    };

    private ReadResult Observation(ResourceFacts facts, ObservationFacts observation, IResourceSet set)
    {
        if (_options.ResultIdentifierSystem is { } own && facts.Identifiers.Any(identifier => identifier.System == own))
        {
            return new() { Own = true };
        }

        if (Persons.IsWithdrawn(observation.Status))
        {
            return new() { Withdrawn = true };
        }

        return new ObservationRules(facts, observation, set, _meaning, _quantities, _options).Read();
    }

    private ReadResult End(ResourceFacts facts, Kind kind, string? status, bool ended, string? end, string? encounter)
    {
        if (Persons.IsWithdrawn(status))
        {
            return new() { Withdrawn = true };
        }

        if (!ended)
        {
            return new();
        }

        var times = new EventTimes(_options.Of(facts.Key.Source).Zone, _options.AllowedFuture, facts);
        if (times.Of(end) is not { } time || facts.Patient is null)
        {
            return new() { Ignored = [new("", Refusals.EventWithoutTime, kind.Key)] };
        }

        return new()
        {
            Readings =
            [
                new Reading
                {
                    Id = new(facts.Key, ""),
                    Version = facts.Version,
                    Base = facts.Base,
                    Kind = kind,
                    Value = 0,
                    At = time.At,
                    AtText = time.Text,
                    Patient = facts.Patient,
                    Encounter = encounter,
                    Flags = time.Flags,
                },
            ],
        };
    }
}
