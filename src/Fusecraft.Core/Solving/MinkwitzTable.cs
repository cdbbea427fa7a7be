using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Words for a stabilizer chain of a vertex group: for each level and each point of its orbit a loop that brings the point back to the base point and keeps the base points before it. Any member
/// is undone by one such loop a level. Short loops fill the table first, then products of what is there; a shorter word always replaces a longer one.
/// </summary>
/// <remarks>
/// Source: T. Minkwitz, <em>An algorithm for solving the factorization problem in permutation groups</em>, J. Symbolic Comput. 26 (1998) (from memory). Differs in that entries bring points back
/// instead of taking them there, so that no loop need ever be inverted: with one-way steps an inverse may be very long.
/// </remarks>
internal sealed class MinkwitzTable<T>
    where T : unmanaged, IBinaryInteger<T>
{
    /// <summary>A word longer than this is not kept.</summary>
    private const int MaxWordLength = 1 << 16;

    private readonly Mechanism _mechanism;
    private readonly int[] _base;
    private readonly Entry?[][] _entries;
    private readonly int _stride;
    private readonly SeededRandom _random;
    private int _missing;

    public MinkwitzTable(VertexGroup group, ulong seed)
    {
        _mechanism = group.Groupoid.Mechanism;
        _stride = Lanes.PaddedLength(_mechanism.SiteCount);
        _random = new SeededRandom(seed);
        var chain = group.Group.Chain;
        _base = [.. chain.Base];
        _entries = new Entry?[_base.Length][];
        for (var level = 0; level < _base.Length; level++)
        {
            _entries[level] = new Entry?[_mechanism.SiteCount];
            _missing += chain.OrbitLengths[level] - 1;
        }
    }

    /// <summary>True when every member can be undone.</summary>
    public bool IsFull => _missing == 0;

    /// <summary>Fills the table and shortens its words.</summary>
    /// <param name="loops">Loops at the base shape, shortest first, that generate the vertex group.</param>
    /// <param name="rounds">How many products of loops to try beyond those needed to fill the table.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public void Fill(IReadOnlyList<TurnPath> loops, int rounds, CancellationToken cancellation)
    {
        var elements = new List<Entry>();
        foreach (var loop in loops)
        {
            var lanes = new T[_stride];
            loop.Permutation.CopyLanes<T>(lanes);
            elements.Add(new Entry(lanes, [.. loop.Steps.Select(step => (ushort)step.Index)]));
        }

        if (elements.Count == 0 || IsFull)
        {
            return;
        }

        // The greatest word length grows while the table is not full.
        var limit = Math.Max(8L, 4L * elements[Math.Min(elements.Count - 1, 64)].Word.Length);
        foreach (var element in elements)
        {
            Insert(element, 0, limit);
        }

        for (var round = 0; (round < rounds || !IsFull) && limit < MaxWordLength; round++)
        {
            cancellation.ThrowIfCancellationRequested();

            // Short loops are more often of use than long ones, so they are drawn more often.
            var product = Draw(elements);
            for (var factors = _random.NextInt32(3); factors > 0; factors--)
            {
                product = Product(product, Draw(elements));
            }

            Insert(product, 0, limit);
            if (round % 256 == 255)
            {
                Improve(limit, cancellation);
                if (!IsFull)
                {
                    FillOrbits(limit);
                    limit = Math.Min(MaxWordLength, limit + (limit / 4));
                }
            }
        }
    }

    /// <summary>The steps of a loop that undoes a member of the vertex group; null where the table lacks an entry or it is no member.</summary>
    public List<Step>? Undo(Permutation member)
    {
        var current = new T[_stride];
        member.CopyLanes<T>(current);
        var steps = new List<Step>();
        for (var level = 0; level < _base.Length; level++)
        {
            var point = int.CreateTruncating(current[_base[level]]);
            if (point == _base[level])
            {
                continue;
            }

            if (_entries[level][point] is not { } entry)
            {
                return null;
            }

            Lanes.ComposePadded<T>(current, entry.Lanes, current);
            steps.AddRange(entry.Word.Select(step => _mechanism.Steps[step]));
        }

        return Lanes.IsIdentity<T>(current) ? steps : null;
    }

    private Entry Draw(List<Entry> elements) => elements[Math.Min(_random.NextInt32(elements.Count), _random.NextInt32(elements.Count))];

    private Entry Product(Entry first, Entry second)
    {
        var lanes = new T[_stride];
        Lanes.ComposePadded<T>(first.Lanes, second.Lanes, lanes);
        return new Entry(lanes, Join(first.Word, second.Word));
    }

    // Sifts an element from a level on, leaving it wherever it is better than what is there.
    private void Insert(Entry element, int level, long limit)
    {
        for (; level < _base.Length && element.Word.Length <= limit; level++)
        {
            var image = int.CreateTruncating(element.Lanes[_base[level]]);
            if (image == _base[level])
            {
                continue;
            }

            // It brings back the point that it takes to the base point; its inverse, where that is made of free steps, brings back the image.
            Offer(level, element.Lanes.AsSpan().IndexOf(T.CreateTruncating(_base[level])), element);
            if (_mechanism.IsReversible)
            {
                Offer(level, image, Inverse(element));
            }

            if (_entries[level][image] is not { } back)
            {
                return;
            }

            element = Product(element, back);
        }
    }

    private void Offer(int level, int point, Entry element)
    {
        ref var entry = ref _entries[level][point];
        if (entry is null)
        {
            _missing--;
        }
        else if (entry.Word.Length <= element.Word.Length)
        {
            return;
        }

        entry = element;
    }

    // Products of two entries of a level that were not multiplied before.
    private void Improve(long limit, CancellationToken cancellation)
    {
        for (var level = 0; level < _base.Length; level++)
        {
            cancellation.ThrowIfCancellationRequested();
            var entries = _entries[level].OfType<Entry>().ToList();
            foreach (var first in entries)
            {
                foreach (var second in entries)
                {
                    if ((!first.IsUsed || !second.IsUsed) && first.Word.Length + second.Word.Length <= limit)
                    {
                        Insert(Product(first, second), level, limit);
                    }
                }
            }

            entries.ForEach(entry => entry.IsUsed = true);
        }
    }

    // A point that some entry takes to a point with an entry can be brought back in two goes.
    private void FillOrbits(long limit)
    {
        for (var level = 0; level < _base.Length; level++)
        {
            var helpers = _entries.Skip(level).SelectMany(entries => entries.OfType<Entry>()).ToList();
            foreach (var helper in helpers)
            {
                for (var point = 0; point < _mechanism.SiteCount; point++)
                {
                    var next = int.CreateTruncating(helper.Lanes[point]);
                    if (_entries[level][point] is null && point != _base[level] && _entries[level][next] is { } back
                        && helper.Word.Length + back.Word.Length <= limit)
                    {
                        Offer(level, point, Product(helper, back));
                    }
                }
            }
        }
    }

    private Entry Inverse(Entry element)
    {
        var lanes = new T[_stride];
        Lanes.InvertPadded<T>(element.Lanes, lanes);
        var word = new ushort[element.Word.Length];
        for (var i = 0; i < word.Length; i++)
        {
            word[i] = Opposite(element.Word[^(i + 1)]);
        }

        return new Entry(lanes, word);
    }

    // One word after the other; steps that undo each other where the two meet fall away.
    private ushort[] Join(ushort[] first, ushort[] second)
    {
        var cancelled = 0;
        if (_mechanism.IsReversible)
        {
            while (cancelled < first.Length && cancelled < second.Length && first[^(cancelled + 1)] == Opposite(second[cancelled]))
            {
                cancelled++;
            }
        }

        return [.. first.AsSpan(0, first.Length - cancelled), .. second.AsSpan(cancelled)];
    }

    private ushort Opposite(ushort step) => (ushort)_mechanism.Steps[step].Opposite!.Index;

    /// <summary>A loop: its permutation in padded lanes and its steps.</summary>
    private sealed class Entry(T[] lanes, ushort[] word)
    {
        public T[] Lanes { get; } = lanes;

        public ushort[] Word { get; } = word;

        /// <summary>True when it has been multiplied with all entries of its level.</summary>
        public bool IsUsed { get; set; }
    }
}
