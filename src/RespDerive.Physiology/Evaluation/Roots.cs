using System.Runtime.InteropServices;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>
/// The root values of one computation. Formulas ask it for a kind, a slot or the result of another definition;
/// what is not a root is computed from the roots, so a chain is always a function of roots alone.
/// </summary>
/// <remarks>
/// A formula is called twice for each root by the uncertainty budget, so every question must be a look-up: kinds and slots are numbered,
/// and which option fills a slot is settled once for a set of roots. Reusable after <see cref="Clear"/>; not for several threads at once.
/// </remarks>
public sealed class Roots
{
    private const int Absent = 0;
    private const int Unfilled = -1;
    private readonly List<Root> _roots = [];
    private readonly List<Filling> _fillings = [];

    /// <summary>By number of the kind: place among the roots + 1.</summary>
    private short[] _places = [];

    /// <summary>By number of the slot: place among the fillings + 1, or one of the two marks.</summary>
    private short[] _filled = [];

    /// <summary>Numbers of the slots asked for so far, so that they can be forgotten.</summary>
    private readonly List<int> _asked = [];

    /// <summary>Values as formulas see them: those of the roots, but for what the budget is moving.</summary>
    private double[] _values = new double[16];

    /// <summary>No roots yet.</summary>
    public Roots()
    {
    }

    /// <summary>Takes the roots of one computation; one per kind.</summary>
    public Roots(IEnumerable<Root> roots)
    {
        foreach (var root in roots)
        {
            Add(root);
        }
    }

    /// <summary>The roots.</summary>
    public IReadOnlyList<Root> All => _roots;

    /// <summary>The roots, without an enumerator.</summary>
    internal ReadOnlySpan<Root> Span => CollectionsMarshal.AsSpan(_roots);

    /// <summary>Value of a kind: the root if there is one, else computed by the definition that yields it.</summary>
    /// <exception cref="KeyNotFoundException">No root and no formula.</exception>
    public double this[Kind kind]
    {
        get
        {
            var place = Place(kind);
            return place != Absent ? _values[place - 1] : kind.Formula is { } formula ? formula(this) : throw new KeyNotFoundException(kind.Key);
        }
    }

    /// <summary>Value of a slot: its first option that is complete, terms added.</summary>
    public double this[Slot slot]
    {
        get
        {
            var place = Filled(slot);
            if (place == Unfilled)
            {
                throw new KeyNotFoundException(slot.Name);
            }

            var filling = CollectionsMarshal.AsSpan(_fillings)[place - 1];
            return filling.Only is { } kind ? this[kind] : filling.Option.Sum(this);
        }
    }

    /// <summary>Adds a root; the first of a kind counts.</summary>
    public void Add(Root root)
    {
        Forget();
        _roots.Add(root);
        var number = root.Kind.Number;
        Make(ref _places, number);
        if (_places[number] == Absent)
        {
            _places[number] = (short)_roots.Count;
        }

        if (_values.Length < _roots.Count)
        {
            Array.Resize(ref _values, 2 * _values.Length);
        }

        _values[_roots.Count - 1] = root.Value;
    }

    /// <summary>Takes all roots away; what was allocated stays for the next computation.</summary>
    public void Clear()
    {
        Forget();
        foreach (var root in Span)
        {
            _places[root.Kind.Number] = Absent;
        }

        _roots.Clear();
    }

    /// <summary>True when the kind is itself a root.</summary>
    public bool Has(Kind kind) => Place(kind) != Absent;

    /// <summary>True when one option of the slot is complete.</summary>
    public bool Has(Slot slot) => Filled(slot) != Unfilled;

    /// <summary>True when one option of each slot is complete.</summary>
    public bool HasAll(IReadOnlyList<Slot> slots)
    {
        for (var i = 0; i < slots.Count; i++)
        {
            if (!Has(slots[i]))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Code of a coded root; null when absent.</summary>
    public string? Code(Kind kind) => Place(kind) is var place && place != Absent ? kind.Codes[(int)_values[place - 1]] : null;

    /// <summary>The option that fills a slot; null when none does.</summary>
    internal Option? Chosen(Slot slot) => Filled(slot) is var place && place != Unfilled ? _fillings[place - 1].Option : null;

    /// <summary>Lets formulas see a root elsewhere; by 0 puts it back. Presence does not change, so fillings stand.</summary>
    internal void Move(int index, double by) => _values[index] = _roots[index].Value + by;

    private int Place(Kind kind) => kind.Number < _places.Length ? _places[kind.Number] : Absent;

    private int Filled(Slot slot) => slot.Number < _filled.Length && _filled[slot.Number] is var place && place != Absent ? place : Fill(slot);

    private int Fill(Slot slot)
    {
        var place = Unfilled;
        for (var i = 0; i < slot.Options.Count && place == Unfilled; i++)
        {
            var option = slot.Options[i];
            if (option.Complete(this))
            {
                _fillings.Add(new Filling(option, option.Terms.Count == 1 ? option.Terms[0].Present(this) : null));
                place = _fillings.Count;
            }
        }

        Make(ref _filled, slot.Number);
        _filled[slot.Number] = (short)place;
        _asked.Add(slot.Number);
        return place;
    }

    private void Forget()
    {
        foreach (var number in CollectionsMarshal.AsSpan(_asked))
        {
            _filled[number] = Absent;
        }

        _asked.Clear();
        _fillings.Clear();
    }

    private static void Make(ref short[] table, int number)
    {
        if (number >= table.Length)
        {
            Array.Resize(ref table, Math.Max(number + 1, 2 * table.Length));
        }
    }

    /// <summary>What fills a slot.</summary>
    /// <param name="Option">The option.</param>
    /// <param name="Only">The kind, when the option is a single term.</param>
    private readonly record struct Filling(Option Option, Kind? Only);
}
