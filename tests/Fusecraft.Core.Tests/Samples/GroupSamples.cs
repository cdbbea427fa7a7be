using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on groups; the regions are the text shown there.</summary>
public class GroupSamples
{
    [Fact]
    public void Orders()
    {
        #region Groups.Orders
        var cube = Mechanism.Create(new MechanismDefinition { Name = "Bare cube", Family = new CubeFamily(3) }).UnguardedGroup;
        var order = cube.Order;                    // 43252003274489856000
        var proof = cube.Chain.Proof.IsProven;     // true, as always unless a test with an error bound was asked for

        var flip = Permutation.FromCycle(4, 48);   // two stickers exchanged, all others in place
        var evidence = cube.Explain(flip);         // says which orbit or which level of the chain shows that it is no member
        #endregion

        Assert.Equal(BigInteger.Parse("43252003274489856000"), order);
        Assert.True(proof);
        Assert.False(evidence.IsMember);
    }

    [Fact]
    public void Colours()
    {
        #region Groups.Colours
        var cube = Mechanism.Create(new MechanismDefinition { Name = "Bare cube", Family = new CubeFamily(5), Colours = ColourScheme.Faces });
        var colours = cube.ColourOfSite;

        // Positions that look different when the centres of a face look alike.
        var looks = cube.UnguardedGroup.OrbitSizeOfColouring([.. colours]);

        // What can happen without being seen.
        var unseen = cube.UnguardedGroup.ColouringStabilizer([.. colours]);
        #endregion

        // OEIS A075152 (opened).
        Assert.Equal(BigInteger.Parse("282870942277741856536180333107150328293127731985672134721536000000000000000"), looks);
        Assert.Equal(cube.UnguardedGroup.Order, looks * unseen.Order);
    }

    [Fact]
    public void Portrait()
    {
        #region Groups.Portrait
        var cube = Mechanism.Create(new MechanismDefinition { Name = "Bare cube", Family = new CubeFamily(3) }).UnguardedGroup;
        var portrait = cube.Portrait();
        var text = portrait.ToString();
        #endregion

        var page = File.ReadAllText(Repository.PathOf("docs/groups.md"));
        Assert.Contains(text.ReplaceLineEndings("\n").TrimEnd(), page, StringComparison.Ordinal);
    }

    [Fact]
    public void Tests()
    {
        #region Groups.Tests
        var expected = KnownGroups.WreathProduct(KnownGroups.Cyclic(2), KnownGroups.Symmetric(3));
        var mine = PermutationGroup.Generate(Permutation.Parse("(1 2)"), Permutation.Parse("(1 3)(2 4)"), Permutation.Parse("(1 3 5)(2 4 6)"));
        var isSame = mine.SameGroupAs(expected);   // true
        #endregion

        Assert.True(isSame);
    }

    [Fact]
    public void Certificate()
    {
        #region Groups.Certificate
        var group = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5)"), Permutation.Parse("(1 2 3)"));
        var certificate = group.CertifyOrder();
        var json = certificate.ToJson();

        // Elsewhere, and trusting nobody: the checker shares no code with what made the certificate.
        var read = OrderCertificate.Parse(json);
        var verdict = CertificateChecker.Check(read, group.Generators);
        var accepted = verdict.IsAccepted;         // true: the order 60 is proven
        #endregion

        Assert.True(accepted);
        Assert.Equal(60, read.Order);
    }
}
