using BenchmarkDotNet.Attributes;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>Composition of byte lanes: vector code against the plain loop, a thousand products each. The setup proves that they agree.</summary>
public class ComposeBenchmarks
{
    private const int Rows = 32;
    private const int Products = 1000;

    private PackedPermutations<byte> _rows = null!;
    private byte[] _result = null!;

    [Params(24, 48, 96, 144, 256)]
    public int Degree { get; set; }

    [GlobalSetup]
    public void Setup()
    {
        var random = new SeededRandom(1);
        var stride = Lanes.PaddedLength(Degree);
        _rows = new PackedPermutations<byte>(stride);
        _result = new byte[stride];
        for (var i = 0; i < Rows; i++)
        {
            random.NextPermutation(Degree).CopyLanes(_rows.AddRow());
        }

        var expected = new byte[stride];
        for (var i = 1; i < Rows; i++)
        {
            Lanes.Compose<byte>(_rows[i - 1], _rows[i], expected);
            Lanes.ComposePadded<byte>(_rows[i - 1], _rows[i], _result);
            if (!expected.AsSpan().SequenceEqual(_result))
            {
                throw new InvalidOperationException("Vector code and plain loop disagree.");
            }
        }
    }

    [Benchmark(Baseline = true, OperationsPerInvoke = Products)]
    public byte PlainLoop()
    {
        for (var i = 0; i < Products; i++)
        {
            Lanes.Compose<byte>(_rows[i % Rows][..Degree], _rows[(i + 7) % Rows], _result);
        }

        return _result[0];
    }

    [Benchmark(OperationsPerInvoke = Products)]
    public byte Padded()
    {
        for (var i = 0; i < Products; i++)
        {
            Lanes.ComposePadded<byte>(_rows[i % Rows], _rows[(i + 7) % Rows], _result);
        }

        return _result[0];
    }
}
