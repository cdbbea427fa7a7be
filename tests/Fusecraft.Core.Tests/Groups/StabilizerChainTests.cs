using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class StabilizerChainTests
{
    [Property(MaxTest = 50)]
    public bool Any_base_prefix_gives_the_same_order_and_members(ulong seed)
    {
        var group = SmallGroups.Random(seed, 14);
        var random = new SeededRandom(seed);
        int[] prefix = [.. Enumerable.Range(0, 14).OrderBy(_ => random.NextUInt64()).Take(random.NextInt32(15))];
        var chain = StabilizerChain.Build(group, new ChainOptions { BasePrefix = prefix });
        var member = group.RandomElement(random);
        var other = random.NextPermutation(14);
        return SmallGroups.FindFault(chain) is null && chain.Order == group.Order && chain.Contains(member) && chain.Contains(other) == group.Contains(other)
            && chain.Base.TakeWhile(prefix.Contains).SequenceEqual(prefix.Where(chain.Base.Contains));
    }

    [Property(MaxTest = 50)]
    public bool A_known_order_and_random_tests_give_the_same_chain_as_a_proof(ulong seed)
    {
        var group = SmallGroups.Random(seed, 20);
        var known = StabilizerChain.Build(group, new ChainOptions { OrderBound = group.Order });
        var tested = StabilizerChain.Build(group, new ChainOptions { Verify = false });
        return known.Proof.IsProven && SmallGroups.FindFault(known) is null && known.Base.SequenceEqual(group.Chain.Base)
            && tested.OrbitLengths.SequenceEqual(group.Chain.OrbitLengths) && known.OrbitLengths.SequenceEqual(group.Chain.OrbitLengths);
    }

    [Property(MaxTest = 50)]
    public bool Representatives_and_generators_of_a_level_fix_the_base_points_before(ulong seed)
    {
        var group = SmallGroups.Random(seed, 12);
        var chain = group.Chain;
        for (var level = 0; level < chain.Base.Length; level++)
        {
            foreach (var point in chain.Orbit(level))
            {
                var representative = chain.Representative(level, point);
                if (representative[chain.Base[level]] != point || !group.Contains(representative) || chain.Base.Take(level).Any(b => representative[b] != b))
                {
                    return false;
                }
            }

            // By the orbit-stabilizer theorem, each level's own generators make a group of the order of the rest of the chain.
            if (PermutationGroup.Generate(chain.GeneratorsOf(level), 12).Order != chain.OrbitLengths.Skip(level).Aggregate(BigInteger.One, (a, b) => a * b))
            {
                return false;
            }
        }

        return chain.GeneratorsOf(chain.Base.Length).IsEmpty && chain.StrongGenerators.All(group.Contains);
    }

    [Property(MaxTest = 50)]
    public bool Sifting_multiplies_by_a_member(ulong seed)
    {
        var group = SmallGroups.Random(seed, 12);
        var permutation = new SeededRandom(seed).NextPermutation(12);
        var residue = group.Chain.Sift(permutation, out var level);
        return group.Contains(permutation.Inverse() * residue) && group.Chain.Base.Take(level).All(point => residue[point] == point)
            && (residue.IsIdentity ? level == group.Chain.Base.Length : !group.Contains(permutation));
    }

    [Theory]
    [InlineData(255)]
    [InlineData(256)]
    [InlineData(257)]
    [InlineData(300)]
    public void Chains_work_on_both_sides_of_the_lane_width(int degree)
    {
        // A dihedral group with its action doubled on the last two points.
        var turn = Permutation.FromCycle([.. Enumerable.Range(0, degree - 2)]);
        var flip = Permutation.FromImages([.. Enumerable.Range(0, degree - 2).Select(i => degree - 3 - i), degree - 1, degree - 2]);
        var group = PermutationGroup.Generate(turn, flip);

        Assert.Equal(2 * (degree - 2), group.Order);
        Assert.Null(SmallGroups.FindFault(group.Chain));
        Assert.True(group.Contains(turn.Power(17) * flip));
        Assert.False(group.Contains(Permutation.FromCycle(degree - 2, degree - 1)));
        Assert.False(group.Contains(Permutation.FromCycle(degree - 1, degree)));
        Assert.Equal(group.Order - 1, group.Rank(group.Unrank(group.Order - 1)));
    }

    [Fact]
    public void A_chain_grows_with_its_generators_and_stays_proven()
    {
        var random = new SeededRandom(11);
        var builder = new ChainBuilder<byte>(30);
        var lanes = new byte[builder.Stride];
        var generators = new List<Permutation>();
        for (var i = 0; i < 40; i++)
        {
            var a = random.NextInt32(30);
            var b = (a + 1 + (3 * random.NextInt32(9))) % 30;
            var c = (b + 1 + random.NextInt32(28)) % 30;
            var generator = c == a ? Permutation.FromCycle(a, b) : Permutation.FromCycle(a, b, c);
            generator.CopyLanes<byte>(lanes);
            var held = builder.Contains(lanes);

            Assert.Equal(!held, builder.Add(lanes));
            builder.Complete();
            generators.Add(generator);

            Assert.True(builder.IsProven);
            Assert.True(builder.Contains(lanes));
            Assert.Equal(PermutationGroup.Generate([.. generators], 30).Order, builder.Order);
        }

        var chain = builder.ToChain();
        Assert.Null(SmallGroups.FindFault(chain));
        Assert.True(chain.Proof.IsProven);
    }

    [Fact]
    public void Membership_allocates_nothing()
    {
        foreach (var degree in new[] { 48, 300 })
        {
            var group = PermutationGroup.Generate(Permutation.FromCycle([.. Enumerable.Range(0, degree)]));
            var member = group.Generators[0].Power(5);
            var other = Permutation.FromCycle(1, 2);
            Assert.True(group.Contains(member));
            var before = GC.GetAllocatedBytesForCurrentThread();
            for (var i = 0; i < 1000; i++)
            {
                group.Contains(member);
                group.Contains(other);
            }

            Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        }
    }

    [Fact]
    public void Wrong_options_are_refused()
    {
        var group = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2), Permutation.FromCycle(0, 1));

        Assert.Throws<ArgumentException>(() => StabilizerChain.Build(group, new ChainOptions { BasePrefix = [0, 0] }));
        Assert.Throws<ArgumentException>(() => StabilizerChain.Build(group, new ChainOptions { BasePrefix = [3] }));
        Assert.Throws<ArgumentException>(() => StabilizerChain.Build(group, new ChainOptions { OrderBound = 5 }));
        Assert.Throws<ArgumentException>(() => StabilizerChain.Build(group, new ChainOptions { ErrorBits = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => group.Chain.Representative(2, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => group.Chain.Representative(1, 0));
    }

    [Fact]
    public void Building_can_be_cancelled()
    {
        var group = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2), Permutation.FromCycle(0, 1));
        using var source = new CancellationTokenSource();
        source.Cancel();

        Assert.Throws<OperationCanceledException>(() => StabilizerChain.Build(group, cancellationToken: source.Token));
    }

    [Fact]
    public void A_chain_says_what_it_rests_on()
    {
        var group = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2), Permutation.FromCycle(0, 1));

        Assert.Equal("proven", group.Chain.Proof.ToString());
        Assert.Equal("error at most 2^-30", StabilizerChain.Build(group, new ChainOptions { Verify = false, ErrorBits = 30 }).Proof.ToString());
    }
}
