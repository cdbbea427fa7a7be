using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Symmetries of a mechanism's turns, as a group: they act on sites, on steps and on shapes. Home need not be kept; <see cref="FixingHome"/> are those that keep it.</summary>
/// <remarks>
/// A mechanism with a guard written in code has no symmetry but the identity, because none can be verified. Sites that no step moves, that no guard reads and that hold nothing at home stay where they are: to exchange them would say nothing. Immutable, safe to share.
/// </remarks>
public sealed class SymmetryGroup
{
    private readonly StepMatcher _matcher;

    private SymmetryGroup(Mechanism mechanism, StepMatcher matcher, PermutationGroup sites)
    {
        Mechanism = mechanism;
        _matcher = matcher;
        Sites = sites;
        Generators = [.. sites.Generators.Select(Verified)];
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>The group as it acts on the sites.</summary>
    public PermutationGroup Sites { get; }

    /// <summary>Symmetries that generate the group, in the order of the generators of <see cref="Sites"/>.</summary>
    public ImmutableArray<MechanismSymmetry> Generators { get; }

    /// <summary>The number of symmetries.</summary>
    public BigInteger Order => Sites.Order;

    /// <summary>
    /// The symmetries of a mechanism. For a cube the rotations and reflections that take turns to turns (for an even size those that keep the reference corner), for a board those of the plane; for
    /// any other mechanism all that there are, found from its steps.
    /// </summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static SymmetryGroup Of(Mechanism mechanism, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        if (mechanism.BuiltSymmetries.IsEmpty || GuardForm.IsCoded(mechanism))
        {
            return Find(mechanism, cancellationToken);
        }

        var matcher = NewMatcher(mechanism);
        var members = mechanism.BuiltSymmetries.Where(sites => matcher.Match(sites) is not null).ToList();
        var generators = new List<Permutation>();
        var reached = new HashSet<Permutation> { Permutation.Identity };
        foreach (var member in members.Where(member => !reached.Contains(member)))
        {
            cancellationToken.ThrowIfCancellationRequested();
            generators.Add(member);
            reached = [.. PermutationClosure.List(generators, members.Count)!];
        }

        return new SymmetryGroup(mechanism, matcher, PermutationGroup.FromOrder([.. generators], mechanism.SiteCount, reached.Count));
    }

    /// <summary>All symmetries of a mechanism, found from its steps alone, whoever built it.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Colour refinement of sites and steps with backtracking; a symmetry is fixed by where it takes one site of each orbit of the turns, so the search is shallow. Exponential in the worst case.
    /// </remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static SymmetryGroup Find(Mechanism mechanism, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        var matcher = NewMatcher(mechanism);
        ImmutableArray<Permutation> generators = GuardForm.IsCoded(mechanism) ? [] : new SiteMatching(mechanism, mechanism, matcher, cancellationToken).Automorphisms();
        return new SymmetryGroup(mechanism, matcher, PermutationGroup.Generate(generators, mechanism.SiteCount));
    }

    /// <summary>The group that some symmetries generate, each of which is verified.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="symmetries">Permutations of its sites.</param>
    /// <exception cref="ArgumentException">A permutation is no symmetry of the mechanism.</exception>
    public static SymmetryGroup Generate(Mechanism mechanism, params IEnumerable<Permutation> symmetries)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(symmetries);
        ImmutableArray<Permutation> all = [.. symmetries];
        var matcher = NewMatcher(mechanism);
        foreach (var sites in all)
        {
            if (sites.SupportEnd > mechanism.SiteCount || matcher.Match(sites) is null)
            {
                throw new ArgumentException($"{sites} is no symmetry of {mechanism.Name}: it does not take every turn to a turn.", nameof(symmetries));
            }
        }

        return new SymmetryGroup(mechanism, matcher, PermutationGroup.Generate(all.Where(sites => !sites.IsIdentity), mechanism.SiteCount));
    }

    /// <summary>The symmetry that moves the sites as given; null where that is no member.</summary>
    public MechanismSymmetry? Member(Permutation sites) => Sites.Contains(sites) ? Verified(sites) : null;

    /// <summary>All symmetries, the identity first.</summary>
    /// <remarks>One after the other; there may be very many.</remarks>
    public IEnumerable<MechanismSymmetry> Members() => Sites.Elements().Select(Verified);

    /// <summary>The symmetries that take home to itself: every block to a block and every mark to a mark of that name.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes time and memory for all images of the home shape. Generators by Schreier's lemma.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public SymmetryGroup FixingHome(CancellationToken cancellationToken = default) => Fixing(Mechanism.Home, cancellationToken);

    /// <summary>The symmetries that take a shape to itself: every block to a block and every mark to a mark of that name.</summary>
    /// <param name="kept">A shape of the mechanism.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes time and memory for all images of the shape. Generators by Schreier's lemma.</remarks>
    /// <exception cref="ArgumentException">The shape belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public SymmetryGroup Fixing(Shape kept, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(kept);
        if (!ReferenceEquals(kept.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The shape belongs to another mechanism than {Mechanism.Name}.", nameof(kept));
        }

        var first = PlacedShape.Of(kept);
        var reached = new Dictionary<PlacedShape, Permutation> { [first] = Permutation.Identity };
        var queue = new Queue<PlacedShape>([first]);
        var fixing = new HashSet<Permutation>();
        while (queue.TryDequeue(out var shape))
        {
            cancellationToken.ThrowIfCancellationRequested();
            foreach (var generator in Generators)
            {
                var image = shape.Moved(generator.Sites, generator.Pieces);
                var there = reached[shape] * generator.Sites;
                if (reached.TryAdd(image, there))
                {
                    queue.Enqueue(image);
                }
                else
                {
                    fixing.Add(there * reached[image].Inverse());
                }
            }
        }

        fixing.Remove(Permutation.Identity);
        var order = Order / reached.Count;
        return new SymmetryGroup(Mechanism, _matcher, PermutationGroup.FromOrder(Thinned(fixing, order), Mechanism.SiteCount, order));
    }

    internal SymmetryGroup Subgroup(PermutationGroup sites) => new(Mechanism, _matcher, sites);

    internal MechanismSymmetry Verified(Permutation sites) => new(Mechanism, sites, Pieces(sites, out var steps), steps);

    private int[] Pieces(Permutation sites, out int[] steps)
    {
        steps = _matcher.Match(sites, out var pieces) ?? throw new InvalidOperationException($"{sites} is no symmetry of {Mechanism.Name}.");
        return pieces;
    }

    // Adjacency matters, because a block's bonds are those of its adjacent pieces.
    private static StepMatcher NewMatcher(Mechanism mechanism) => new(mechanism, mechanism, keepsAdjacency: true);

    // A few of the permutations that generate a group of the given order.
    private ImmutableArray<Permutation> Thinned(IEnumerable<Permutation> generators, BigInteger order)
    {
        var kept = ImmutableArray<Permutation>.Empty;
        var group = PermutationGroup.Generate(kept, Mechanism.SiteCount);
        foreach (var generator in generators)
        {
            if (group.Order == order)
            {
                break;
            }

            if (!group.Contains(generator))
            {
                kept = kept.Add(generator);
                group = PermutationGroup.Generate(kept, Mechanism.SiteCount);
            }
        }

        return kept;
    }
}
