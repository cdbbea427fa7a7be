using System.Collections.Immutable;
using System.Diagnostics;
using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>
/// The composition factors of a group. It is taken apart by homomorphisms with known kernels: its action on an orbit, its action on the parts of a block system; what is left is primitive. Of a primitive group
/// the solvable quotient is split off by the derived series, and of an affine one the translations. A perfect primitive group that is not affine is simple with few exceptions; its order then tells its name.
/// </summary>
/// <remarks>
/// <para>Why simple: by the theorem of O'Nan and Scott the socle is a power T^k of a non-abelian simple group. A minimal normal subgroup's factors T are permuted transitively by a perfect group, so they are one, or
/// five and more. If the socle is one T, the quotient by it is solvable (Schreier's conjecture, proven by the classification), and a perfect group is T itself. If there are two minimal normal subgroups, each is
/// regular; with one T each the group is T × T on |T| points. With five or more T the degree is an l-th power, l at least 5, or at least 60^4; the order is divisible by 4^5.</para>
/// <para>Sources: M. W. Liebeck, C. E. Praeger, J. Saxl, <em>On the O'Nan-Scott theorem for finite primitive permutation groups</em>, J. Austral. Math. Soc. A 44 (1988); J. D. Dixon, B. Mortimer, <em>Permutation Groups</em>
/// (1996), ch. 4 (sources not opened, from memory). Solvable by order: W. Burnside for two primes, W. Feit and J. G. Thompson for odd orders; orders of non-abelian simple groups are divisible by 12, or by 320 (those of Suzuki).</para>
/// </remarks>
internal sealed class CompositionWalk
{
    private readonly CancellationToken _cancellation;
    private readonly SortedDictionary<int, int> _cyclic = [];
    private readonly List<(FactoredInteger Order, ImmutableArray<string> Names, bool IsSimple)> _others = [];

    private CompositionWalk(CancellationToken cancellation) => _cancellation = cancellation;

    /// <summary>The factors: non-abelian ones by falling order, then cyclic ones, then what is unrecognised.</summary>
    public static ImmutableArray<CompositionFactor> FactorsOf(PermutationGroup group, CancellationToken cancellation)
    {
        var walk = new CompositionWalk(cancellation);
        walk.Split(group);
        var others = walk._others.GroupBy(other => (other.Order, other.IsSimple, Names: string.Join(" = ", other.Names)))
            .OrderByDescending(same => same.Key.Order.Value).ThenBy(same => same.Key.Names, StringComparer.Ordinal)
            .Select(same => new CompositionFactor(same.First().Names, same.Key.Order, same.Count(), same.Key.IsSimple)).ToList();
        ImmutableArray<CompositionFactor> factors =
        [
            .. others.Where(factor => factor.IsSimple),
            .. walk._cyclic.Select(power => new CompositionFactor([$"C{power.Key}"], FactoredInteger.FromFactors(power.Key), power.Value, isSimple: true)),
            .. others.Where(factor => !factor.IsSimple),
        ];
        Debug.Assert(factors.Aggregate(BigInteger.One, (product, factor) => product * BigInteger.Pow(factor.Order.Value, factor.Multiplicity)) == group.Order, "The factors multiply to the order.");
        return factors;
    }

    private void Split(PermutationGroup group)
    {
        _cancellation.ThrowIfCancellationRequested();
        if (TakeSolvable(group.Order, group.Degree))
        {
            return;
        }

        var orbits = group.MovedOrbits;
        var kernel = orbits.Length > 1 ? group.PointwiseStabilizer(orbits[0].AsSpan()) : null;
        SplitTransitive(orbits[0].Length == group.Degree ? group : OrbitImage.Of(group, orbits[0], group.Order / (kernel?.Order ?? 1)));
        if (kernel is not null)
        {
            Split(kernel);
        }
    }

    // A transitive group on all its points.
    private void SplitTransitive(PermutationGroup group)
    {
        if (TakeSolvable(group.Order, group.Degree))
        {
            return;
        }

        if (Giants.Kind(group.Order, group.Degree) is { } isAlternating)
        {
            if (!isAlternating)
            {
                TakeCyclic(FactoredInteger.FromFactors(2));
            }

            TakeSimple(FactoredInteger.FromSmooth(isAlternating ? group.Order : group.Order / 2, group.Degree), $"Alt({group.Degree})");
            return;
        }

        var systems = group.MinimalBlockSystems(0);
        if (systems.IsEmpty)
        {
            SplitPrimitive(group);
            return;
        }

        var action = group.ActionOn(systems[0]);
        SplitTransitive(action.Image);
        var kernelOrder = group.Order / action.Image.Order;
        if (!TakeSolvable(kernelOrder, group.Degree))
        {
            Split(PermutationGroup.FromOrder(action.Kernel.Generators, group.Degree, kernelOrder));
        }
    }

    private void SplitPrimitive(PermutationGroup group)
    {
        var perfect = group.DerivedSeries()[^1];
        if (perfect.Order < group.Order)
        {
            TakeCyclic(FactoredInteger.FromSmooth(group.Order / perfect.Order, group.Degree));
            Split(perfect);
            return;
        }

        switch (AffineSearch.IsAffine(group, _cancellation))
        {
            case true:
                // The stabilizer of a point is a complement of the translations.
                TakeCyclic(FactoredInteger.FromFactors(group.Degree));
                Split(group.PointwiseStabilizer(0));
                break;
            case false:
                TakePerfectPrimitive(group);
                break;
            default:
                TakeUnrecognised(group);
                break;
        }
    }

    private void TakePerfectPrimitive(PermutationGroup group)
    {
        var order = FactoredInteger.FromSmooth(group.Order, group.Degree);
        var degree = FactoredInteger.FromFactors(group.Degree);
        var half = order == degree * degree ? SimpleGroupNames.OfOrder(degree) : [];
        var names = SimpleGroupNames.OfOrder(order);
        if (MayHaveManyFactors(group.Degree, group.Order) || (!half.IsEmpty && (!names.IsEmpty || group.Degree == SimpleGroupNames.AmbiguousOrder)))
        {
            TakeUnrecognised(group);
        }
        else if (!half.IsEmpty)
        {
            // There is no simple group of this order, so this is T × T.
            TakeSimple(degree, half);
            TakeSimple(degree, half);
        }
        else
        {
            TakeSimple(order, group.Order == SimpleGroupNames.AmbiguousOrder ? NamesOfAmbiguous(group) : names);
        }
    }

    // Alt(8) has elements of orders 6 and 15, PSL(3,4) none of order above 7 and none of order 6 (Atlas, from memory).
    private static ImmutableArray<string> NamesOfAmbiguous(PermutationGroup group) =>
        group.Elements().Any(member => member.CycleType.Order is var order && (order == 6 || order == 15)) ? ["Alt(8)", "PSL(4,2)"] : ["PSL(3,4)"];

    /// <summary>False where degree or order tell that a perfect primitive group that is not affine has at most two simple factors in its socle.</summary>
    internal static bool MayHaveManyFactors(int degree, BigInteger order) => (order % 1024).IsZero && IsFifthOrHigherPower(degree);

    private static bool IsFifthOrHigherPower(int n)
    {
        for (var root = 5; BigInteger.Pow(root, 5) <= n; root++)
        {
            var power = BigInteger.Pow(root, 5);
            while (power < n)
            {
                power *= root;
            }

            if (power == n)
            {
                return true;
            }
        }

        return false;
    }

    // Cyclic factors alone, where the order has them so.
    private bool TakeSolvable(BigInteger order, int degree)
    {
        if (!(order % 12).IsZero && !(order % 320).IsZero)
        {
            TakeCyclic(FactoredInteger.FromSmooth(order, degree));
            return true;
        }

        var factored = FactoredInteger.FromSmooth(order, degree);
        if (factored.PrimePowers.Length > 2)
        {
            return false;
        }

        TakeCyclic(factored);
        return true;
    }

    private void TakeCyclic(FactoredInteger order)
    {
        foreach (var (prime, exponent) in order.PrimePowers)
        {
            _cyclic[prime] = _cyclic.GetValueOrDefault(prime) + exponent;
        }
    }

    private void TakeSimple(FactoredInteger order, string name)
    {
        var names = SimpleGroupNames.OfOrder(order);
        TakeSimple(order, order.Value == SimpleGroupNames.AmbiguousOrder ? ["Alt(8)", "PSL(4,2)"] : [name, .. names.Where(other => other != name)]);
    }

    private void TakeSimple(FactoredInteger order, ImmutableArray<string> names) => _others.Add((order, names, true));

    private void TakeUnrecognised(PermutationGroup group) => _others.Add((FactoredInteger.FromSmooth(group.Order, group.Degree), [], false));
}
