using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Builds the stabilizer chain of a group whose generators come one by one: random elements first, which find the whole chain fast and nearly always,
/// then <see cref="Complete"/>, which makes it proven by sifting every Schreier generator, a level's generators being few random ones.
/// </summary>
/// <remarks>
/// <para>Sources: C. C. Sims, <em>Computational methods in the study of permutation groups</em> (1970); Á. Seress, <em>Permutation Group Algorithms</em>
/// (Cambridge 2003), ch. 4 (sources not opened, methods from memory).</para>
/// <para>Invariant: each level's generators are, by construction, elements of the group that the generators of the level before make, fixing that level's base point.
/// Hence the chain never holds anything outside the group; it holds the whole group as soon as at each level every Schreier generator of
/// <em>that level's own</em> generators sifts away below. So a level need not carry the strong generators of the levels below it, and there is
/// little to check: orbit length times a handful a level.</para>
/// <para>Base points are the prefix, then 0, 1, 2, …, each where its orbit is not trivial; so base and orbit lengths do not depend on the random elements. Not safe to share between threads.</para>
/// </remarks>
internal sealed partial class ChainBuilder<T>
    where T : unmanaged, IBinaryInteger<T>
{
    /// <summary>So many random elements in a row must lie in the chain below before a level is taken for complete, subject to the proof.</summary>
    private const int QuietRounds = 4;

    /// <summary>
    /// So many random generators a level gets before the levels below it are settled: a few nearly always generate everything, while settling for fewer
    /// makes levels below that have to grow later, and every generator a level has is paid for in the proof. Measured on cubes and symmetric groups.
    /// </summary>
    private const int FirstGenerators = 4;

    private const ulong Seed = 0xF05E_C4AF;

    private readonly ChainTables<T> _tables;
    private readonly int[] _candidates;
    private readonly T[] _sifted;
    private readonly T[] _representative;
    private readonly T[] _product;
    private readonly SeededRandom _random = new(Seed);
    private BigInteger? _orderBound;
    private bool _handedOver;

    /// <summary>Starts from the trivial group.</summary>
    /// <param name="degree">Points are 0 … degree-1; at most 256 for lanes of one byte.</param>
    /// <param name="basePrefix">Distinct points to take first as base points.</param>
    /// <param name="orderBound">A number that the group's order is known not to exceed: a chain that reaches it needs no further proof.</param>
    public ChainBuilder(int degree, ReadOnlySpan<int> basePrefix = default, BigInteger? orderBound = null)
    {
        _tables = new ChainTables<T>(degree);
        _orderBound = orderBound;
        _sifted = new T[Stride];
        _representative = new T[Stride];
        _product = new T[Stride];
        _candidates = new int[degree];
        var taken = new bool[degree];
        var count = 0;
        foreach (var point in basePrefix)
        {
            taken[point] = true;
            _candidates[count++] = point;
        }

        IsLexicographic = count == 0;
        for (var point = 0; point < degree; point++)
        {
            if (!taken[point])
            {
                _candidates[count++] = point;
            }
        }
    }

    public int Degree => _tables.Degree;

    /// <summary>Lanes of a padded permutation: what <see cref="Add"/> and <see cref="Contains"/> take.</summary>
    public int Stride => _tables.Stride;

    /// <summary>True when the base ascends, so that digits along it count in lexicographic order of image lists.</summary>
    public bool IsLexicographic { get; }

    /// <summary>True when the chain is known to hold the whole group generated so far; <see cref="Complete"/> makes it so.</summary>
    public bool IsProven { get; private set; } = true;

    /// <summary>The number of elements the chain holds: the order of the group where proven, else a number not above it.</summary>
    public BigInteger Order => _tables.Order;

    /// <summary>True when the chain holds the permutation (padded lanes). A true answer always holds; a false one only where proven. Without allocation.</summary>
    public bool Contains(ReadOnlySpan<T> permutation)
    {
        permutation.CopyTo(_sifted);
        return _tables.SiftsAway(_sifted);
    }

    /// <summary>The same, in the memory of the permutation itself, which is left in ruins; safe from several threads while nothing is added.</summary>
    public bool ContainsInPlace(Span<T> permutation) => _tables.SiftsAway(permutation);

    /// <summary>Adds a generator (padded lanes), if the chain does not hold it yet, and lets random elements extend the chain. Says whether it did.</summary>
    public bool Add(ReadOnlySpan<T> generator, CancellationToken cancellation = default)
    {
        if (!AddUnsettled(generator))
        {
            return false;
        }

        Settle(0, cancellation);
        return true;
    }

    /// <summary>As <see cref="Add"/>, but leaves the extending to a later <see cref="Add"/> or <see cref="Complete"/>: for several generators at once.</summary>
    public bool AddUnsettled(ReadOnlySpan<T> generator)
    {
        if (Contains(generator))
        {
            return false;
        }

        Insert(0, generator);
        return true;
    }

    /// <summary>Makes the chain proven: checks the Schreier generators not checked before and extends the chain by those that it does not hold.</summary>
    public void Complete(CancellationToken cancellation = default)
    {
        if (IsProven)
        {
            return;
        }

        Settle(0, cancellation);
        for (var i = _tables.Count - 1; i >= 0 && !ReachesBound();)
        {
            if (Check(i, cancellation))
            {
                i--;
            }
            else
            {
                Settle(i + 1, cancellation);
                i = _tables.Count - 1;
            }
        }

        IsProven = true;
    }

    /// <summary>
    /// Instead of a proof: sifts random elements of the whole group until so many in a row lay in the chain. Were the chain not complete, each uniformly random
    /// element would lie in it with probability at most 1/2.
    /// </summary>
    public void SettleForError(int bits, CancellationToken cancellation = default)
    {
        Settle(0, cancellation);
        for (var quiet = 0; quiet < bits && _tables.Count > 0; quiet++)
        {
            cancellation.ThrowIfCancellationRequested();
            _tables[0].Walk.Next(_random).CopyTo(_sifted);
            _tables.Sift(_sifted);
            if (!_sifted.AsSpan().SequenceEqual(_tables.Identity))
            {
                _tables[0].Quiet = 0;
                Settle(0, cancellation);
                quiet = -1;
            }
        }

        IsProven |= ReachesBound();
    }

    /// <summary>Hands the chain over; the builder takes no further generators.</summary>
    /// <param name="errorBits">What to claim for a chain that is not proven.</param>
    public StabilizerChain ToChain(int errorBits = 1)
    {
        _handedOver = true;
        RequireValid();
        return new StabilizerChain(_tables, IsProven ? ChainProof.Proven : ChainProof.ErrorBound(errorBits), IsLexicographic);
    }

    // From the given level up to the first: draws random elements of the level's stabilizer and gives the level below those that it does not hold,
    // always settling the deepest level first.
    private void Settle(int start, CancellationToken cancellation)
    {
        var i = Math.Min(start, _tables.Count - 1);
        while (i >= 0)
        {
            cancellation.ThrowIfCancellationRequested();
            var level = _tables[i];
            if (level.Quiet >= QuietRounds)
            {
                i--;
                continue;
            }

            var element = Stabilized(i);
            element.CopyTo(_sifted);
            if (!_tables.SiftsAway(_sifted, i + 1))
            {
                level.Quiet = 0;
                Insert(i + 1, element);

                if (_tables[i + 1].Generators.Count >= FirstGenerators)
                {
                    if (_orderBound is not null && ReachesBound())
                    {
                        return;
                    }

                    i++;
                }
            }
            else
            {
                level.Quiet++;
                if (i + 1 < _tables.Count && _tables[i + 1].Quiet < QuietRounds)
                {
                    i++;
                }
            }
        }
    }

    // A random element of the level's group, made to fix the level's base point.
    private ReadOnlySpan<T> Stabilized(int index)
    {
        var level = _tables[index];
        level.Walk.Next(_random).CopyTo(_product);
        var slot = level.Slots[int.CreateTruncating(_product[level.Point])];
        Lanes.ComposePadded<T>(_product, level.Inverses[slot], _product);
        return _product;
    }

    // Sifts the Schreier generators of a level that were not checked before; at the first that does not sift away, adds what is left of it to the level below and gives false.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private bool Check(int index, CancellationToken cancellation)
    {
        var level = _tables[index];
        for (var x = 0; x < level.OrbitLength; x++)
        {
            var first = level.CheckedGenerators(x);
            if (first == level.Generators.Count)
            {
                continue;
            }

            cancellation.ThrowIfCancellationRequested();
            var point = level.OrbitPoint(x);
            Lanes.InvertPadded<T>(level.Inverses[x], _representative);
            for (var s = first; s < level.Generators.Count; s++)
            {
                var generator = level.Generators[s];
                var y = level.Slots[int.CreateTruncating(generator[point])];
                if (level.IsTreeEdge(x, s, y))
                {
                    continue;
                }

                Lanes.ComposePadded<T>(_representative, generator, _product);
                Lanes.ComposePadded<T>(_product, level.Inverses[y], _product);
                if (!_tables.SiftsAway(_product, index + 1))
                {
                    level.SetChecked(x, s);
                    level.Quiet = 0;
                    Insert(index + 1, _product);
                    return false;
                }
            }

            level.SetChecked(x, level.Generators.Count);
        }

        return true;
    }

    // Adds a generator to the level at an index. It fixes the base points of all levels before; a new level is made where it moves a point that comes before the level's base point.
    private void Insert(int index, ReadOnlySpan<T> generator)
    {
        Debug.Assert(!_handedOver, "The chain has been handed over.");
        IsProven = false;
        var position = 0;
        while (generator[_candidates[position]] == T.CreateTruncating(_candidates[position]))
        {
            position++;
        }

        Debug.Assert(index == 0 || position > _tables[index - 1].Position, "A generator must fix all earlier base points.");
        if (index == _tables.Count || _tables[index].Position > position)
        {
            var level = new ChainLevel<T>(_candidates[position], position, _tables.Identity, Degree);
            if (index < _tables.Count)
            {
                var next = _tables[index];
                for (var s = 0; s < next.Generators.Count; s++)
                {
                    level.AddGenerator(next.Generators[s]);
                }
            }

            _tables.Insert(index, level);
        }

        _tables[index].AddGenerator(generator);
    }

    [Conditional("DEBUG")]
    private void RequireValid()
    {
        // Completeness is checked the slow way, so only where that takes no time to speak of.
        var fault = _tables.FindFault(IsProven && _tables.Count <= 20);
        Debug.Assert(fault is null, fault);
    }
}
