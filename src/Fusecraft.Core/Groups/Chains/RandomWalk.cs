using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Nearly uniform random elements of a group given by generators: product replacement with an accumulator.
/// </summary>
/// <remarks>
/// Source: F. Celler, C. R. Leedham-Green, S. H. Murray, A. C. Niemeyer, E. A. O'Brien, <em>Generating random elements of a finite group</em>,
/// Comm. Algebra 23 (1995) (source not opened, method from memory). The elements only speed up a construction that is proven afterwards.
/// </remarks>
internal sealed class RandomWalk<T>(int stride)
    where T : unmanaged, IBinaryInteger<T>
{
    private const int FewestSlots = 6;
    private const int WarmUp = 40;

    private readonly PackedPermutations<T> _slots = new(stride, FewestSlots + 1);
    private readonly T[] _accumulator = new T[stride];
    private int _generators;
    private int _steps;

    /// <summary>Lets one more generator take part.</summary>
    public void Add(ReadOnlySpan<T> generator)
    {
        if (_generators == 0)
        {
            generator.CopyTo(_accumulator);
        }

        _generators++;
        _slots.Add(generator);
        _steps = 0;
    }

    /// <summary>Takes a step and gives the element reached; valid until the next call. At least one generator has been added.</summary>
    public ReadOnlySpan<T> Next(SeededRandom random)
    {
        // Small sets mix better when generators stand in several slots.
        for (var k = 0; _slots.Count < FewestSlots; k++)
        {
            var row = _slots.AddRow();
            _slots[k % _generators].CopyTo(row);
        }

        do
        {
            Step(random);
        }
        while (++_steps < WarmUp);

        return _accumulator;
    }

    // Optimised from the first call, like sifting.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Step(SeededRandom random)
    {
        var count = _slots.Count;
        var pick = random.NextInt32(count * (count - 1));
        var i = pick / (count - 1);
        var j = pick % (count - 1);
        var replaced = _slots[i];
        Lanes.ComposePadded<T>(replaced, _slots[j < i ? j : j + 1], replaced);
        Lanes.ComposePadded<T>(_accumulator, replaced, _accumulator);
    }
}
