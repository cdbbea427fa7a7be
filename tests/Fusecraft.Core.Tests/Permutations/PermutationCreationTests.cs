using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class PermutationCreationTests
{
    [Fact]
    public void Images_say_where_each_point_goes_and_sources_what_comes_to_each_place()
    {
        Assert.Equal("(1 2 3)", Permutation.FromImages(1, 2, 0).ToString());
        Assert.Equal("(1 3 2)", Permutation.FromSources(1, 2, 0).ToString());
    }

    [Property]
    public bool FromSources_is_the_inverse_of_FromImages(Permutation p)
    {
        var images = new int[p.SupportEnd];
        p.CopyImages(images);
        return Permutation.FromImages(images) == p && Permutation.FromSources(images) == p.Inverse();
    }

    [Property]
    public bool The_product_of_its_cycles_is_the_permutation(Permutation p) =>
        p.Cycles().Aggregate(Permutation.Identity, (product, cycle) => product * Permutation.FromCycle(cycle.AsSpan())) == p;

    [Fact]
    public void A_cycle_sends_each_point_to_the_next_and_the_last_to_the_first()
    {
        var cycle = Permutation.FromCycle(4, 0, 2);
        Assert.Equal([2, 1, 4, 3, 0, 5], Enumerable.Range(0, 6).Select(i => cycle[i]));
        Assert.True(Permutation.FromCycle().IsIdentity);
        Assert.True(Permutation.FromCycle(7).IsIdentity);
    }

    [Fact]
    public void CopyImages_fills_the_whole_span_and_leaves_out_what_does_not_fit()
    {
        var p = Permutation.Parse("(1 2)(4 5)");
        var (longer, shorter) = (new int[7], new int[2]);
        p.CopyImages(longer);
        p.CopyImages(shorter);
        Assert.Equal([1, 0, 2, 4, 3, 5, 6], longer);
        Assert.Equal([1, 0], shorter);
        p.CopyImages([]);
    }

    [Fact]
    public void The_greatest_degree_is_65536()
    {
        Assert.Equal(65_536, Permutation.MaxDegree);
        var images = Enumerable.Range(0, Permutation.MaxDegree).Select(i => Permutation.MaxDegree - 1 - i).ToArray();
        var reversal = Permutation.FromImages(images);
        Assert.Equal(Permutation.MaxDegree, reversal.SupportEnd);
        Assert.Equal(0, reversal[Permutation.MaxDegree - 1]);
        Assert.Equal(Permutation.MaxDegree, reversal[Permutation.MaxDegree]);
        Assert.Equal(int.MaxValue, reversal[int.MaxValue]);
        Assert.Equal(reversal, Permutation.FromSources(images));
        Assert.Equal(2, reversal.Order);
        Assert.Equal(Permutation.MaxDegree, reversal.Support.Length);
        Assert.Equal(2, Permutation.FromCycle(0, Permutation.MaxDegree - 1).Order);
    }

    [Theory]
    [InlineData(new[] { 1, 2, 3 }, "Entry 2 is 3; every entry must be in 0 … 2.")]
    [InlineData(new[] { 0, -1 }, "Entry 1 is -1; every entry must be in 0 … 1.")]
    [InlineData(new[] { 1 }, "Entry 0 is 1; every entry must be in 0 … 0.")]
    [InlineData(new[] { 0, int.MinValue }, "Entry 1 is -2147483648; every entry must be in 0 … 1.")]
    [InlineData(new[] { 1, 0, 1 }, "Entry 2 is 1, which stands in the list already; every point must occur once.")]
    public void Lists_that_are_no_permutation_are_refused(int[] list, string message)
    {
        AssertArgument(message, "images", () => Permutation.FromImages(list));
        AssertArgument(message, "sources", () => Permutation.FromSources(list));
    }

    [Fact]
    public void Lists_above_the_greatest_degree_are_refused()
    {
        var list = Enumerable.Range(0, Permutation.MaxDegree + 1).ToArray();
        const string Message = "65537 points were given; at most 65536 are supported.";
        AssertArgument(Message, "images", () => Permutation.FromImages(list));
        AssertArgument(Message, "sources", () => Permutation.FromSources(list));
    }

    [Theory]
    [InlineData(new[] { 0, 65_536 }, "Point 65536 is outside 0 … 65535.")]
    [InlineData(new[] { int.MaxValue }, "Point 2147483647 is outside 0 … 65535.")]
    [InlineData(new[] { -1, 2 }, "Point -1 is outside 0 … 65535.")]
    [InlineData(new[] { 3, 3 }, "Point 3 stands twice in the cycle; its points must be distinct.")]
    [InlineData(new[] { 1, 2, 2 }, "Point 2 stands twice in the cycle; its points must be distinct.")]
    [InlineData(new[] { 1, 1, 2 }, "Point 1 stands twice in the cycle; its points must be distinct.")]
    [InlineData(new[] { 5, 2, 0, 5 }, "Point 5 stands twice in the cycle; its points must be distinct.")]
    [InlineData(new[] { 0, 1, 2, 1 }, "Point 1 stands twice in the cycle; its points must be distinct.")]
    public void Lists_that_are_no_cycle_are_refused(int[] points, string message) =>
        AssertArgument(message, "points", () => Permutation.FromCycle(points));

    [Fact]
    public void Negative_points_have_no_image()
    {
        var problem = Assert.Throws<ArgumentOutOfRangeException>("point", () => Permutation.Identity[-1]);
        Assert.Equal(-1, problem.ActualValue);
    }

    private static void AssertArgument(string message, string parameter, Func<Permutation> make) =>
        Assert.Equal($"{message} (Parameter '{parameter}')", Assert.Throws<ArgumentException>(parameter, () => make()).Message);
}
