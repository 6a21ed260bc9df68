using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class CodeMapTests
{
    /// <summary>Keys whose codes are known and that are no kind: kept apart, or not computed with yet.</summary>
    private static readonly HashSet<string> KeptApart =
    [
        "po2-venous", "po2-capillary", "pco2-venous", "ph-unspecified", "ph-venous", "ph-mixed-venous", "ph-capillary",
        "so2-venous", "hco3-unspecified", "hco3-venous", "hco3-capillary", "hco3-serum",
        "base-excess-unspecified", "base-excess-venous",
        "lactate", "lactate-venous", "lactate-serum", "pao2-temp-corrected", "paco2-temp-corrected", "ph-temp-corrected",
        "plateau-pressure-dynamic", "pressure-zero-insp-flow", "end-inspiratory-pressure", "peak-pressure-or-limit", "peak-pressure-limit",
        "maximum-inspiratory-pressure", "mean-inspiratory-pressure", "inspiratory-pressure",
        "inspiratory-pressure-set-absolute", "occlusion-pressure", "occlusion-pressure-p01", "drive-pressure-device",
        "tidal-volume-inspired", "tidal-volume-total", "minute-volume", "minute-volume-set", "minute-volume-inspired",
        "respiratory-rate-mechanical", "inspiratory-flow", "inspiratory-time-set", "expiratory-time", "expiratory-time-set",
        "fvc", "fev1", "fev1-fvc",
        "arterial-blood", "venous-blood", "capillary-blood",
    ];

    /// <summary>Kinds for which no standard code is known to us: only a site's own map can bring them in.</summary>
    private static readonly HashSet<string> OfTheSiteOnly =
    [
        "esophageal-pressure", "esophageal-pressure-end-inspiratory", "esophageal-pressure-end-expiratory",
        "ie-ratio-set", "pressure-rise-time-set", "dead-space-volume",
        "scvo2", "po2-mixed-venous", "mixed-expired-co2", "mean-alveolar-pco2",
        "alveolar-volume", "membrane-conductance-no", "inverse-theta-capillary-volume", "alveolar-po2-breath-hold",
    ];

    [Fact]
    public void Every_shipped_key_is_a_kind_or_known_to_be_kept_apart()
    {
        Assert.All(new CodeMap().Rows, row => Assert.NotNull(Keys.Find(row.Key)));
        Assert.All(Keys.All, key => Assert.True(key.Kind is not null || KeptApart.Contains(key.Name), key.Name));
    }

    [Fact]
    public void Every_key_that_a_key_can_become_is_a_key() =>
        Assert.All(Keys.All.SelectMany(key => key.Broader.Append(key.WhenSetting).Append(key.WhenMeasurement).Append(key.WhenArterial)),
            name => Assert.True(name.Length == 0 || Keys.Find(name) is not null, name));

    /// <summary>LOINC Users' Guide: the digit after the hyphen is a mod-10 check digit (the Luhn sum).</summary>
    [Fact]
    public void Every_shipped_loinc_number_passes_its_check_digit()
    {
        var numbers = new CodeMap().Rows.Where(row => row.System == CodeSystems.Loinc).Select(row => row.Code).ToList();

        Assert.True(numbers.Count > 90);
        Assert.All(numbers, number => Assert.True(IsLoinc(number), number));
        Assert.Equal(numbers.Count, numbers.Distinct().Count());
    }

    [Theory]
    [InlineData("3150-6")]
    [InlineData("76530-7")]
    [InlineData("76531-5")]
    [InlineData("0827-3")]
    public void Numbers_in_circulation_that_do_not_exist_fail_the_check(string number) => Assert.False(IsLoinc(number));

    /// <summary>SNOMED CT Technical Implementation Guide: the last digit of an identifier is a Verhoeff check digit.</summary>
    [Fact]
    public void Every_shipped_snomed_identifier_passes_its_check_digit()
    {
        var identifiers = new CodeMap().Rows.Where(row => row.System == CodeSystems.Snomed).Select(row => row.Code).ToList();

        Assert.NotEmpty(identifiers);
        Assert.All(identifiers, identifier => Assert.True(IsSnomed(identifier), identifier));
        Assert.False(IsSnomed("250774008"));
    }

    [Fact]
    public void Snomed_can_be_left_out()
    {
        Assert.DoesNotContain(new CodeMap(snomed: false).Rows, row => row.System == CodeSystems.Snomed);
        Assert.Empty(Read(new ReadingOptions(), new CodeMap(snomed: false), Observation(Coding(CodeSystems.Snomed, "698822002"), Quantity("24", "cm[H2O]"))).Readings);
    }

    [Fact]
    public void Every_kind_that_is_read_has_a_code_or_is_left_to_the_site()
    {
        var reachable = new CodeMap().Readable.SelectMany(row => Keys.Find(row.Key) is { } key
            ? new[] { key.Name, key.WhenSetting, key.WhenMeasurement, key.WhenArterial } : []).ToHashSet();

        Assert.All(Kinds.All.Where(kind => kind.Origin is (Origin.Setting or Origin.Measurement or Origin.Laboratory) && !OfTheSiteOnly.Contains(kind.Key)),
            kind => Assert.Contains(kind.Key, reachable));
    }

    [Fact]
    public void A_site_row_wins_with_its_unit_before_without_and_can_drop_a_code()
    {
        var codes = new CodeMap([new("urn:local", "X", "", "peep"), new("urn:local", "X", "mbar", "peep-set"), new(CodeSystems.Loinc, "76259-1", "", "none")]);

        Assert.Equal(Kinds.PeepSet, Assert.Single(Read(new ReadingOptions(), codes, Observation(Coding("urn:local", "X"), Quantity("8", "mbar"))).Readings).Kind);
        Assert.Equal(Kinds.Peep, Assert.Single(Read(new ReadingOptions(), codes, Observation(Coding("urn:local", "X"), Quantity("8", "cm[H2O]"))).Readings).Kind);
        Assert.Empty(Read(new ReadingOptions(), codes, Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"))).Readings);
        Assert.DoesNotContain(codes.Readable, row => row.Code == "76259-1");
    }

    [Fact]
    public void A_site_table_is_read_with_quotes_comments_and_either_header()
    {
        var rows = SiteMaps.Codes("\uFEFFsystem,code,unit,key\r\n# ours\r\nurn:local,\"a,b\",cm[H2O],peep\r\n\r\nurn:local,c,,fio2\r\n");

        Assert.Empty(rows.Faults);
        Assert.Equal([new MappedCode("urn:local", "a,b", "cm[H2O]", "peep"), new MappedCode("urn:local", "c", "", "fio2")], rows.Rows);
        Assert.Equal("peep", Assert.Single(SiteMaps.Codes("system,code,key\nurn:local,a,peep").Rows).Key);
    }

    [Fact]
    public void All_faults_of_a_site_table_are_told_at_once_with_their_lines()
    {
        var rows = SiteMaps.Codes("system,code,unit,key\nurn:local,a,,peepp\nurn:local,b\nurn:local,c,,peep\nurn:local,c,,fio2\n,d,,peep\nurn:local,\"e,,peep\n");

        Assert.Equal([2, 3, 5, 6, 7], rows.Faults.Select(fault => fault.Line));
        Assert.Equal(1, Assert.Single(SiteMaps.Codes("").Faults).Line);
        Assert.Equal(1, Assert.Single(SiteMaps.Codes("code,system\n1,2").Faults).Line);
        Assert.Equal([2, 3], SiteMaps.Values("key,system,code,value\npeep,,x,y\nventilator-mode,,x,y\n").Faults.Select(fault => fault.Line));
    }

    private static bool IsLoinc(string number)
    {
        var sum = 0;
        var digits = number.Replace("-", "", StringComparison.Ordinal);
        for (var i = 0; i < digits.Length; i++)
        {
            var digit = (digits[^(i + 1)] - '0') * (i % 2 == 0 ? 1 : 2);
            sum += digit > 9 ? digit - 9 : digit;
        }

        return sum % 10 == 0;
    }

    private static bool IsSnomed(string identifier)
    {
        int[] permutation = [1, 5, 7, 6, 2, 8, 3, 0, 9, 4];
        var check = 0;
        for (var i = 0; i < identifier.Length; i++)
        {
            var digit = identifier[^(i + 1)] - '0';
            for (var j = 0; j < i % 8; j++)
            {
                digit = permutation[digit];
            }

            check = Dihedral(check, digit);
        }

        return check == 0;
    }

    /// <summary>Product in the dihedral group of the pentagon: 0 to 4 are rotations, 5 to 9 reflections.</summary>
    private static int Dihedral(int a, int b) => (a < 5, b < 5) switch
    {
        (true, true) => (a + b) % 5,
        (true, false) => 5 + ((a + b - 5) % 5),
        (false, true) => 5 + ((a - 5 - b + 5) % 5),
        (false, false) => (a - b + 5) % 5,
    };
}
