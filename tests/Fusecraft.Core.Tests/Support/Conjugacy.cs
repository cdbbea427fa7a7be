using Fusecraft.Groupoids;

namespace Fusecraft.Tests.Support;

internal static class Conjugacy
{
    /// <summary>Checks that two vertex groups of one region are carried to each other by the permutation of a path between their base shapes.</summary>
    public static void Holds(VertexGroup one, VertexGroup other)
    {
        var path = one.TreePath(other.BaseShape).Permutation;
        Assert.Equal(one.Order, other.Order);
        Assert.All(one.Group.Generators, generator => Assert.True(other.Group.Contains(generator.ConjugateBy(path))));
        Assert.All(other.Group.Generators, generator => Assert.True(one.Group.Contains(generator.ConjugateBy(path.Inverse()))));
    }
}
