using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>A Patient resource as a person.</summary>
internal static class Persons
{
    /// <summary>
    /// The sex that formulas of body size use: the one stated for clinical use, else the one at birth, else the administrative one.
    /// </summary>
    public static Person Read(ResourceFacts facts, PatientFacts patient) =>
        new(facts.Key, facts.Version, Sex(patient), SentTime.Parse(patient.BirthDate) is { Precision: Precision.Date } ? patient.BirthDate : null)
        {
            Base = facts.Base,
        };

    /// <summary>True for a status that says: this should not be.</summary>
    public static bool IsWithdrawn(string? status) => status is "entered-in-error" or "cancelled";

    private static string Sex(PatientFacts patient) => patient.SexForClinicalUse switch
    {
        "female-typical" => "female",
        "male-typical" => "male",
        not null => "unknown",
        null => patient.BirthSex switch
        {
            "F" => "female",
            "M" => "male",
            _ => patient.Gender is "female" or "male" ? patient.Gender : "unknown",
        },
    };
}
