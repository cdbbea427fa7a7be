namespace Fusecraft.Groupoids;

/// <summary>
/// Decides whether two shape graphs are alike under a renaming of turns. Colour refinement first; then one shape with the rarest colour is taken to each shape of that colour, and the rest
/// follows, because arrows are named: only the renaming of a step has to be guessed, where the step is first met.
/// </summary>
internal sealed class ShapeGraphMatching
{
    private readonly ShapeGraph _first;
    private readonly ShapeGraph _second;
    private readonly CancellationToken _cancellation;
    private readonly int[] _images;
    private readonly int[] _sources;
    private readonly int[] _stepImages;
    private readonly int[] _stepSources;
    private readonly List<int> _queue = [];
    private long _triesLeft;

    public ShapeGraphMatching(ShapeGroupoid first, ShapeGroupoid second, long maxTries, CancellationToken cancellation)
    {
        _first = new ShapeGraph(first);
        _second = new ShapeGraph(second);
        _triesLeft = maxTries;
        _cancellation = cancellation;
        _images = new int[_first.Count];
        _sources = new int[_second.Count];
        _stepImages = new int[_first.StepCount];
        _stepSources = new int[_second.StepCount];
    }

    /// <summary>True when the search was given up before all was tried.</summary>
    public bool EndedByBudget => _triesLeft < 0;

    /// <summary>A bijection; null where there is none or the budget ended the search.</summary>
    public ShapeGraphMatch? Find()
    {
        if (_first.Count != _second.Count || _first.StepCount != _second.StepCount || !Refine())
        {
            return null;
        }

        var root = Rarest();
        for (var image = 0; image < _second.Count; image++)
        {
            if (_second.Shapes[image] == _first.Shapes[root] && _second.Groupoid.RegionOf(image) == 0 && ExtendsFrom(root, image))
            {
                var steps = _second.Groupoid.Mechanism.Steps;
                return new ShapeGraphMatch(root, image, [.. _stepImages.Select(step => step < 0 ? null : steps[step])]);
            }

            if (EndedByBudget)
            {
                return null;
            }
        }

        return null;
    }

    // False when the colours already show that the graphs are not alike.
    private bool Refine()
    {
        for (var (last, count) = (0, 1); count > last;)
        {
            _cancellation.ThrowIfCancellationRequested();
            last = count;
            count = _first.Refine();
            if (count != _second.Refine())
            {
                return false;
            }
        }

        return _first.Shapes.Order().SequenceEqual(_second.Shapes.Order()) && _first.Steps.Order().SequenceEqual(_second.Steps.Order());
    }

    // A shape of the home region, from where all shapes can be reached, with as few others of its colour as possible.
    private int Rarest()
    {
        var counts = new Dictionary<ulong, int>();
        foreach (var colour in _first.Shapes)
        {
            counts[colour] = counts.GetValueOrDefault(colour) + 1;
        }

        var best = 0;
        for (var shape = 1; shape < _first.Count; shape++)
        {
            if (counts[_first.Shapes[shape]] < counts[_first.Shapes[best]] && _first.Groupoid.RegionOf(shape) == 0)
            {
                best = shape;
            }
        }

        return best;
    }

    private bool ExtendsFrom(int root, int image)
    {
        Array.Fill(_images, -1);
        Array.Fill(_sources, -1);
        Array.Fill(_stepImages, -1);
        Array.Fill(_stepSources, -1);
        _queue.Clear();
        return TryPair(root, image) && Extends(0, 0);
    }

    // Follows all arrows from the shapes paired so far, from a place in the queue on. As many shapes have the image of a step free as have the step, so only free steps need be looked at.
    private bool Extends(int at, int step)
    {
        for (; at < _queue.Count; at++, step = 0)
        {
            if (at % 4096 == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
            }

            var shape = _queue[at];
            for (; step < _first.StepCount; step++)
            {
                var target = _first.Target(shape, step);
                if (target < 0)
                {
                    continue;
                }

                if (--_triesLeft < 0)
                {
                    return false;
                }

                if (_stepImages[step] < 0)
                {
                    return Guesses(at, step);
                }

                var image = _second.Target(_images[shape], _stepImages[step]);
                if (image < 0 || !TryPair(target, image))
                {
                    return false;
                }
            }
        }

        return true;
    }

    private bool Guesses(int at, int step)
    {
        var length = _queue.Count;
        for (var image = 0; image < _second.StepCount; image++)
        {
            if (!MayBecome(step, image) || _second.Target(_images[_queue[at]], image) < 0)
            {
                continue;
            }

            Rename(step, image, image);
            if (Extends(at, step))
            {
                return true;
            }

            Rename(step, image, -1);
            for (var i = _queue.Count - 1; i >= length; i--)
            {
                _sources[_images[_queue[i]]] = -1;
                _images[_queue[i]] = -1;
            }

            _queue.RemoveRange(length, _queue.Count - length);
            if (EndedByBudget)
            {
                return false;
            }
        }

        return false;
    }

    private bool MayBecome(int step, int image)
    {
        if (_stepSources[image] >= 0 || _first.Steps[step] != _second.Steps[image] || _first.FreeCounts[step] != _second.FreeCounts[image])
        {
            return false;
        }

        var (opposite, imageOpposite) = (_first.Opposites[step], _second.Opposites[image]);
        return (opposite < 0) == (imageOpposite < 0) && (opposite < 0 || _first.FreeCounts[opposite] == _second.FreeCounts[imageOpposite]);
    }

    // Renames both steps of a turn, or takes that back where the last argument is -1.
    private void Rename(int step, int image, int value)
    {
        _stepImages[step] = value;
        _stepSources[image] = value < 0 ? -1 : step;
        if (_first.Opposites[step] >= 0)
        {
            _stepImages[_first.Opposites[step]] = value < 0 ? -1 : _second.Opposites[image];
            _stepSources[_second.Opposites[image]] = value < 0 ? -1 : _first.Opposites[step];
        }
    }

    private bool TryPair(int shape, int image)
    {
        if (_images[shape] >= 0 || _sources[image] >= 0)
        {
            return _images[shape] == image;
        }

        if (_first.Shapes[shape] != _second.Shapes[image])
        {
            return false;
        }

        _images[shape] = image;
        _sources[image] = shape;
        _queue.Add(shape);
        return true;
    }
}
