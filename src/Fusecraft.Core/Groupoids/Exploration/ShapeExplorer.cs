using System.Collections.Immutable;
using System.Runtime.ExceptionServices;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// Breadth-first search over shapes from a first one. Shapes are numbered in the order of their finding, so by their distance from the first; the numbering depends on nothing but the
/// mechanism and the first shape. Shapes are taken batch by batch: their successors are generated side by side on several threads, with a first look whether they are known, and then added
/// one after the other in the order in which a single thread would have come to them.
/// </summary>
internal sealed class ShapeExplorer
{
    /// <summary>Candidates that one piece of work may have; so large that starting it costs nothing beside it, so small that it stays in the cache.</summary>
    private const int ChunkCandidates = 1 << 15;

    private const int MaxChunkShapes = 1 << 10;

    /// <summary>Fewer pieces of work are not worth asking other threads.</summary>
    private const int ParallelChunks = 4;

    /// <summary>The product of tracks is tried first at so many shapes, then each time there are four times as many.</summary>
    private const int FirstProductTry = 1 << 14;

    /// <summary>The bits of a product that a shape may cost when they are first set up.</summary>
    private const ulong BitsAShape = 512;

    /// <summary>A product of so many is set up at no cost worth mentioning.</summary>
    private const ulong SmallProduct = 1UL << 23;

    private const ulong MaxProduct = 1UL << 36;

    private readonly Mechanism _mechanism;
    private readonly ExplorationOptions _options;
    private readonly IProgress<ExplorationProgress>? _progress;
    private readonly CancellationToken _cancellation;
    private readonly int _chunkShapes;
    private readonly List<Candidates> _chunks = [];
    private int _limit;
    private int _nextProductTry = FirstProductTry;

    public ShapeExplorer(Mechanism mechanism, ExplorationOptions options, IProgress<ExplorationProgress>? progress, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _options = options;
        _progress = progress;
        _cancellation = cancellation;
        _chunkShapes = Math.Clamp(ChunkCandidates / Math.Max(1, mechanism.Steps.Length), 1, MaxChunkShapes);
    }

    public ExploredShapes Shapes { get; private set; } = null!;

    /// <summary>Ends the search soon after this shape is found; null to go on.</summary>
    public ulong[]? StopAt { get; init; }

    /// <summary>False to keep to keys in a table whatever the mechanism: to test one kind of holding shapes against the other.</summary>
    public bool MayUseProduct { get; init; } = true;

    /// <summary>The threads that the options allow, also for what is asked of the shapes later.</summary>
    public int DegreeOfParallelism => _options.DegreeOfParallelism;

    public bool IsComplete { get; private set; } = true;

    /// <summary>Pairs (shape, turn) whose forward step is free, over the shapes whose steps were all tried.</summary>
    public long FreeTurns { get; private set; }

    public int DeadEnds { get; private set; }

    public int StuckShapes { get; private set; }

    /// <summary>The first shape of each distance, and at the end the number of shapes.</summary>
    public List<int> LevelStarts { get; } = [0];

    public void Run(ReadOnlySpan<ulong> first)
    {
        Shapes = New(_mechanism, first);
        SetLimit();
        Search();
        Finish();
    }

    /// <summary>Takes what an earlier search found from a file instead of searching.</summary>
    /// <exception cref="InvalidDataException">The file is damaged.</exception>
    public void Run(GraphFileReader file)
    {
        Shapes = New(_mechanism, file.First);
        (IsComplete, FreeTurns, DeadEnds, StuckShapes) = (file.IsComplete, file.FreeTurns, file.DeadEnds, file.StuckShapes);
        var levelEnd = 1;
        for (var parent = 0; parent < file.ShapeCount; parent++)
        {
            if (parent == Shapes.Count)
            {
                throw GraphFileReader.Damaged();
            }

            if (parent == levelEnd)
            {
                LevelStarts.Add(parent);
                levelEnd = Shapes.Count;
            }

            if (Shapes.Count >= _nextProductTry)
            {
                TryProduct();
            }

            file.AddShapesFoundFrom(parent, Shapes);
        }

        file.End(Shapes.Count);
        Finish();
    }

    /// <summary>One shape, held by its key.</summary>
    public static ExploredShapes New(Mechanism mechanism, ReadOnlySpan<ulong> first) => mechanism.Board.Words switch
    {
        1 => new KeyedShapes<OneWord>(mechanism, first),
        2 => new KeyedShapes<TwoWords>(mechanism, first),
        4 => new KeyedShapes<FourWords>(mechanism, first),
        8 => new KeyedShapes<EightWords>(mechanism, first),
        _ => new KeyedShapes<ManyWords>(mechanism, first),
    };

    /// <summary>The steps of a shortest path from the first shape.</summary>
    public ImmutableArray<Step> PathTo(int shape)
    {
        var steps = new List<Step>();
        for (; Shapes.Parent(shape) >= 0; shape = Shapes.Parent(shape))
        {
            steps.Add(_mechanism.Steps[Shapes.ParentStep(shape)]);
        }

        steps.Reverse();
        return [.. steps];
    }

    private void Finish()
    {
        LevelStarts.Add(Shapes.Count);
        _chunks.ForEach(chunk => chunk.Release());
        _chunks.Clear();
        Shapes.Finish(_options.DegreeOfParallelism);
    }

    private void Search()
    {
        var batchShapes = _chunkShapes * Math.Max(16, 8 * _options.DegreeOfParallelism);
        var levelEnd = 1;
        for (var current = 0; current < Shapes.Count;)
        {
            if (current == levelEnd)
            {
                LevelStarts.Add(current);
                levelEnd = Shapes.Count;
            }

            _cancellation.ThrowIfCancellationRequested();
            _progress?.Report(new ExplorationProgress(Shapes.Count, current));
            if (Shapes.Count >= _nextProductTry)
            {
                TryProduct();
            }

            var end = (int)Math.Min(levelEnd, (long)current + batchShapes);
            var chunks = (end - current + _chunkShapes - 1) / _chunkShapes;
            Generate(current, end, chunks);
            for (var i = 0; i < chunks; i++)
            {
                if (!Add(_chunks[i]))
                {
                    // What was found from this distance is of the next one.
                    if (Shapes.Count > levelEnd)
                    {
                        LevelStarts.Add(levelEnd);
                    }

                    return;
                }
            }

            current = end;
        }
    }

    private void Generate(int first, int end, int chunks)
    {
        while (_chunks.Count < chunks)
        {
            _chunks.Add(new Candidates());
        }

        if (chunks < ParallelChunks || _options.DegreeOfParallelism == 1)
        {
            for (var i = 0; i < chunks; i++)
            {
                GenerateChunk(i);
            }
        }
        else
        {
            try
            {
                Parallel.For(0, chunks, new ParallelOptions { MaxDegreeOfParallelism = _options.DegreeOfParallelism }, GenerateChunk);
            }
            catch (AggregateException problems)
            {
                // A condition in code failed: what it threw reaches the caller as it would from one thread.
                ExceptionDispatchInfo.Throw(problems.InnerExceptions[0]);
            }
        }

        void GenerateChunk(int chunk)
        {
            var start = first + (chunk * _chunkShapes);
            Shapes.Generate(start, Math.Min(end, start + _chunkShapes), _chunks[chunk]);
        }
    }

    // False where the search ends here.
    private bool Add(Candidates candidates)
    {
        if (candidates.Clash >= 0)
        {
            throw Clash(candidates.Clash);
        }

        var done = Shapes.Add(candidates, _limit);
        if (done < candidates.Count)
        {
            // The shape whose successor did not fit has not had all its steps tried, nor has any after it.
            IsComplete = false;
            Shapes.Generate(candidates.First, candidates.First + (int)(candidates.Origins[done] >> 16), candidates);
        }

        FreeTurns += candidates.FreeForwardSteps;
        DeadEnds += candidates.DeadEnds;
        StuckShapes += candidates.StuckShapes;
        return IsComplete && (StopAt is null || !Shapes.Contains(StopAt));
    }

    private void TryProduct()
    {
        _nextProductTry = (int)Math.Min(int.MaxValue, 4L * _nextProductTry);
        if (!MayUseProduct
            || _mechanism.Board.ProductWithin(Shapes.Count) is not { } product
            || product.Size > Math.Min(MaxProduct, Math.Max(SmallProduct, BitsAShape * (ulong)Shapes.Count))
            || Shapes.BytesFor(Shapes.Count) + Shapes.BytesFor(product, Shapes.Count) > _options.MaxBytes)
        {
            return;
        }

        // Once only: what does not fit now, for it began elsewhere than at home, never will.
        _nextProductTry = int.MaxValue;
        if (Shapes.In(product) is { } shapes)
        {
            Shapes = shapes;
            SetLimit();
        }
    }

    private void SetLimit() => _limit = Math.Max(Shapes.Count, Math.Min(_options.MaxShapes, _options.MaxBytes == long.MaxValue ? int.MaxValue : Shapes.CountWithin(_options.MaxBytes)));

    // No two steps written alike may be free together.
    private MechanismFormatException Clash(int shape)
    {
        var free = new Shape(_mechanism, Shapes.Key(shape)).FreeSteps();
        var other = free.First(step => free.Any(before => before.Index < step.Index && before.Name == step.Name));
        var one = free.Last(step => step.Index < other.Index && step.Name == other.Name);
        return new MechanismFormatException([new MechanismProblem(
            $"$.turns.{other.Turn.Name}",
            null,
            null,
            $"steps of the turns \"{one.Turn.Name}\" and \"{other.Turn.Name}\", both written \"{one.Name}\" and free in one reachable shape",
            "steps may share a name only where no two of them are ever free together; change \"as\" or \"backAs\"")]);
    }
}
