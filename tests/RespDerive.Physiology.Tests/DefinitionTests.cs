using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology.Tests;

public sealed class DefinitionTests
{
    [Theory]
    [MemberData(nameof(CatalogueData.Vectors), MemberType = typeof(CatalogueData))]
    public void A_worked_example_gives_its_value(string key, int index)
    {
        var definition = CatalogueData.Of(key);
        var vector = definition.Vectors[index];

        var computed = ByHand.Compute(definition, vector.Inputs);

        Assert.Null(computed.Computation.Withheld);
        Assert.Equal(vector.Expected, computed.Computation.Value, vector.Within);
        Assert.Empty(computed.Unused);
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Gates), MemberType = typeof(CatalogueData))]
    public void A_gate_example_trips_its_code_and_no_other(string key, int index)
    {
        var definition = CatalogueData.Of(key);
        var gate = definition.Gates[index];

        var roots = CatalogueData.RootsOf(definition, gate.TrippedBy);
        var tripped = definition.Gates.Where(other => other.Trips(roots)).Select(other => other.Code);

        Assert.Equal([gate.Code], tripped);
        Assert.Equal(gate.Code, ByHand.Compute(definition, gate.TrippedBy).Computation.Withheld);
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Gates), MemberType = typeof(CatalogueData))]
    public void A_gate_is_silent_on_every_worked_example(string key, int index)
    {
        var definition = CatalogueData.Of(key);
        foreach (var vector in definition.Vectors)
        {
            Assert.False(definition.Gates[index].Trips(CatalogueData.RootsOf(definition, vector.Inputs)), vector.Source);
        }
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Vectors), MemberType = typeof(CatalogueData))]
    public void The_value_does_not_depend_on_the_units_of_its_inputs(string key, int index)
    {
        var definition = CatalogueData.Of(key);
        var vector = definition.Vectors[index];
        var expected = ByHand.Compute(definition, vector.Inputs).Computation;
        var converted = 0;
        for (var i = 0; i < vector.Inputs.Count; i++)
        {
            foreach (var unit in vector.Inputs[i].Unit is { } from ? Ucum.Alike(from) : [])
            {
                Assert.True(Ucum.TryConvert(vector.Inputs[i].Value!.Value, vector.Inputs[i].Unit!, unit, out var value));
                var changed = vector.Inputs.ToArray();
                changed[i] = changed[i] with { Value = value, Unit = unit };
                var actual = ByHand.Compute(definition, changed).Computation;
                Assert.Equal(expected.Value, actual.Value, 1e-12 * Math.Max(1, Math.Abs(expected.Value)));
                Assert.Equal(expected.Published, actual.Published);
                converted++;
            }
        }

        Assert.NotEqual(0, converted);
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Vectors), MemberType = typeof(CatalogueData))]
    public void Without_one_of_its_inputs_the_value_is_withheld_and_the_input_named(string key, int index)
    {
        var definition = CatalogueData.Of(key);
        var vector = definition.Vectors[index];
        var whole = ByHand.Compute(definition, vector.Inputs).Computation;
        for (var i = 0; i < vector.Inputs.Count; i++)
        {
            var without = vector.Inputs.Where((_, at) => at != i).ToArray();
            var computed = ByHand.Compute(definition, without);
            var kind = CatalogueData.RootsOf(definition, [vector.Inputs[i]]).All[0].Kind;
            if (kind.Assumed is not null || HasStandIn(definition, kind) || (computed.Computation.Withheld is null && computed.Computation.Variant != whole.Variant))
            {
                continue; // has a default, or the rest is another way to the value, named by its variant
            }

            Assert.True(computed.Computation.Withheld is not null, $"{key} without {vector.Inputs[i].Name}");
            Assert.Contains(computed.Computation.Withheld, MissingCodes(definition));
            Assert.NotEmpty(computed.Computation.Missing);
        }
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Definitions), MemberType = typeof(CatalogueData))]
    public void Each_definition_can_be_checked_against_something_outside_itself(string key)
    {
        var definition = CatalogueData.Of(key);
        Assert.Contains(definition.Vectors, vector => vector.Evidence is Evidence.Published or Evidence.Limit);
        Assert.NotEmpty(definition.Citations);
        Assert.NotEmpty(definition.Caution);
        Assert.Contains(definition.Result.Symbol, definition.Equation, StringComparison.Ordinal);
        Assert.InRange(definition.Usual.Least, definition.Result.Least, definition.Usual.Greatest);
        Assert.InRange(definition.Usual.Greatest, definition.Usual.Least, definition.Result.Greatest);
    }

    [Theory]
    [MemberData(nameof(CatalogueData.Definitions), MemberType = typeof(CatalogueData))]
    public void The_anchor_of_a_definition_is_one_of_its_inputs(string key)
    {
        var definition = CatalogueData.Of(key);
        var kinds = Chain.Slots(definition).SelectMany(slot => slot.Kinds).ToHashSet();
        Assert.All(definition.Calling.Anchors, anchor => Assert.Contains(anchor, kinds));
    }

    [Fact]
    public void No_two_kinds_share_a_key_and_only_the_minute_volume_shares_a_symbol()
    {
        var kinds = Kinds.All.Concat(Catalogue.Shipped.All.Select(definition => definition.Result)).ToArray();
        Assert.Equal(kinds.Length, kinds.Select(kind => kind.Key).Distinct().Count());
        Assert.Equal(["VE"], kinds.GroupBy(kind => kind.Symbol).Where(group => group.Count() > 1).Select(group => group.Key));
    }

    /// <summary>LOINC check digit: the modulus-10 (Luhn) digit of the number; LOINC Users' Guide, "The LOINC code".</summary>
    [Theory]
    [MemberData(nameof(CatalogueData.Definitions), MemberType = typeof(CatalogueData))]
    public void Loinc_numbers_carry_their_check_digit(string key)
    {
        foreach (var code in CatalogueData.Of(key).Codes.Where(code => code.System == "http://loinc.org"))
        {
            Assert.True(HasCheckDigit(code.Code), code.Code);
        }
    }

    [Fact]
    public void The_check_digit_finds_a_wrong_number() => Assert.False(HasCheckDigit("50984-5"));

    private static bool HasCheckDigit(string loinc)
    {
        var parts = loinc.Split('-');
        var sum = parts[0].Reverse().Select((c, i) => i % 2 == 0 ? (c - '0') * 2 : c - '0').Sum(digit => (digit / 10) + (digit % 10));
        return parts.Length == 2 && (10 - (sum % 10)) % 10 == parts[1][0] - '0';
    }

    /// <summary>True when a slot it fills, alone or with others, has an option of constants only.</summary>
    private static bool HasStandIn(Definition definition, Kind kind) => Chain.Slots(definition).Any(slot => slot.Kinds.Contains(kind)
        && slot.Options.Any(option => option.Terms.All(term => term.AnyOf.All(other => other.Assumed is not null))));

    private static IEnumerable<string> MissingCodes(Definition definition) => Chain.Slots(definition).Select(slot => slot.Missing);
}
