using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What a random walk does at each shape of a region: probabilities depend on the shape alone. Steps that leave the region count as barred.</summary>
internal sealed class WalkRates
{
    private const double Alike = 1e-12;
    private readonly int _stepCount;

    // For each place and step the probability, and where the step leads; barred ones have probability 0.
    private readonly double[] _probabilities;
    private readonly RegionShapes _region;

    public WalkRates(RegionShapes region, WalkOptions options)
    {
        _region = region;
        _stepCount = region.Mechanism.Steps.Length;
        _probabilities = new double[checked(region.Count * _stepCount)];
        Holds = new double[region.Count];
        FillProbabilities(WeightsOf(region, options), options);
        Arriving = MoveSet.Of(region, Metric.Step, default).Reversed(region.Count);
        Width = Arriving.Width;
        Rates = new double[checked(region.Count * Width)];
        for (var place = 0; place < region.Count; place++)
        {
            for (var slot = 0; slot < Width; slot++)
            {
                var source = Arriving.Target(place, slot);
                Rates[(place * Width) + slot] = source < 0 ? 0 : _probabilities[(source * _stepCount) + Arriving.MoveAt(place, slot).Steps[0].Index];
            }
        }

        if (!IsConnected())
        {
            throw new ArgumentException("With steps of weight 0 the walk cannot go from every shape of the region to every other.", nameof(options));
        }

        Stationary = StationaryShapes.Of(this);
        IsUniform = Stationary.AsSpan().IndexOfAnyExceptInRange((1 - Alike) / region.Count, (1 + Alike) / region.Count) < 0;
        IsReversible = IsBalanced();
        Symmetric = new double[Rates.Length];
        for (var i = 0; i < Rates.Length; i++)
        {
            Symmetric[i] = Rates[i] == 0 ? 0 : Rates[i] * Math.Sqrt(Stationary[Arriving.Target(i / Width, i % Width)] / Stationary[i / Width]);
        }
    }

    /// <summary>The number of shapes.</summary>
    public int PlaceCount => Holds.Length;

    /// <summary>The steps that arrive at each shape, a slot each.</summary>
    public MoveSet Arriving { get; }

    /// <summary>The number of slots of a shape.</summary>
    public int Width { get; }

    /// <summary>For each place and slot the probability of the step, where it starts.</summary>
    public double[] Rates { get; }

    /// <summary>The rates of the matrix that is similar to the walk's and symmetric where the walk is reversible: times the root of the stationary weight where the step starts over that where it ends.</summary>
    public double[] Symmetric { get; }

    /// <summary>For each place the probability of a turn that does nothing.</summary>
    public double[] Holds { get; }

    /// <summary>The stationary probability of each shape.</summary>
    public double[] Stationary { get; }

    /// <summary>True when all shapes are equally likely in the stationary distribution.</summary>
    public bool IsUniform { get; }

    /// <summary>True when steps and their reverses are equally likely in the stationary distribution.</summary>
    public bool IsReversible { get; }

    /// <summary>Roundings of a probability, of that of staying, and of the sum they go into, in units in the last place.</summary>
    public int RoundingsOfTurn => Width + (3 * _stepCount) + 8;

    /// <summary>For each shape the weight of all that can be done there.</summary>
    public double[] FreeWeights { get; private set; } = [];

    /// <summary>The distribution over the shapes after one turn more.</summary>
    public double[] Next(double[] shapes)
    {
        var next = new double[shapes.Length];
        for (var place = 0; place < next.Length; place++)
        {
            var sum = Holds[place] * shapes[place];
            for (var slot = 0; slot < Width; slot++)
            {
                sum += Rates[(place * Width) + slot] is > 0 and var rate ? rate * shapes[Arriving.Target(place, slot)] : 0;
            }

            next[place] = sum;
        }

        return next;
    }

    private static double[] WeightsOf(RegionShapes region, WalkOptions options)
    {
        var steps = region.Mechanism.Steps;
        foreach (var (name, weight) in options.Weights)
        {
            if (!(weight >= 0 && double.IsFinite(weight)))
            {
                throw new ArgumentException($"The weight of {name} is {weight}; it must be 0 or a positive number.", nameof(options));
            }

            if (!steps.Any(step => step.Name == name))
            {
                throw new ArgumentException($"The walk weighs a step {name}; the mechanism {region.Mechanism.Name} has no such step.", nameof(options));
            }
        }

        return [.. steps.Select(step => options.Weights.GetValueOrDefault(step.Name, 1))];
    }

    private void FillProbabilities(double[] weights, WalkOptions options)
    {
        FreeWeights = new double[_region.Count];
        var all = weights.Sum();
        for (var place = 0; place < _region.Count; place++)
        {
            for (var step = 0; step < _stepCount; step++)
            {
                FreeWeights[place] += _region.After(place, step) >= 0 ? weights[step] : 0;
            }

            var free = FreeWeights[place];
            var chosen = options.Choice == WalkChoice.FreeSteps ? free : all;
            Holds[place] = free == 0 ? 1 : options.Holding + ((1 - options.Holding) * Math.Max(0, chosen - free) / chosen);
            for (var step = 0; step < _stepCount && free > 0; step++)
            {
                _probabilities[(place * _stepCount) + step] = _region.After(place, step) >= 0 ? (1 - options.Holding) * weights[step] / chosen : 0;
            }
        }
    }

    // Each shape must be reached from the base and lead back to it.
    private bool IsConnected()
    {
        var (from, to) = (new bool[PlaceCount], new bool[PlaceCount]);
        Reach(from, (place, slot) => slot < _stepCount && _probabilities[(place * _stepCount) + slot] > 0 ? _region.After(place, slot) : -1);
        Reach(to, (place, slot) => slot < Width && Rates[(place * Width) + slot] > 0 ? Arriving.Target(place, slot) : -1);
        return !from.Contains(false) && !to.Contains(false);
    }

    private void Reach(bool[] seen, Func<int, int, int> next)
    {
        var queue = new Queue<int>([0]);
        seen[0] = true;
        while (queue.TryDequeue(out var place))
        {
            for (var slot = 0; slot < Math.Max(_stepCount, Width); slot++)
            {
                if (next(place, slot) is >= 0 and var target && !seen[target])
                {
                    seen[target] = true;
                    queue.Enqueue(target);
                }
            }
        }
    }

    // Steps with one permutation do the same wherever both are free.
    private bool IsBalanced()
    {
        var steps = _region.Mechanism.Steps;
        var kinds = new Dictionary<Permutation, List<int>>();
        foreach (var step in steps)
        {
            (kinds.TryGetValue(step.Permutation, out var list) ? list : kinds[step.Permutation] = []).Add(step.Index);
        }

        var same = steps.Select(step => kinds[step.Permutation]).ToArray();
        var reverse = steps.Select(step => kinds.GetValueOrDefault(step.Permutation.Inverse(), [])).ToArray();
        for (var place = 0; place < PlaceCount; place++)
        {
            for (var step = 0; step < _stepCount; step++)
            {
                if (_probabilities[(place * _stepCount) + step] == 0)
                {
                    continue;
                }

                var target = _region.After(place, step);
                var (there, back) = (Stationary[place] * Total(place, same[step], target), Stationary[target] * Total(target, reverse[step], place));
                if (Math.Abs(there - back) > Alike * there)
                {
                    return false;
                }
            }
        }

        return true;
    }

    private double Total(int place, List<int> steps, int target)
    {
        var total = 0.0;
        foreach (var step in steps)
        {
            total += _region.After(place, step) == target ? _probabilities[(place * _stepCount) + step] : 0;
        }

        return total;
    }
}
