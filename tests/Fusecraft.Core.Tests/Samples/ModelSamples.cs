using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the model page; the regions are the text shown there.</summary>
public class ModelSamples
{
    [Fact]
    public void Regions()
    {
        var path = Repository.PathOf("docs/workshop/mill-race.fuse.json");

        #region Model.Regions
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Load(path));
        var passage = groupoid.Passages().Single();     // Chute, from shape 2 to shape 5
        var there = groupoid.DistanceOf(4);             // 2 steps from home,
        var back = groupoid.DistancesBack()[4];         // but 6 back; -1 for shape 5, in the trap

        var graph = groupoid.GraphOf(0);                // the home region
        var diameter = graph.Diameter();                // 6, exact
        var bridges = graph.Bridges().Length;           // 5, all of them steps of the one-way wheel
        var gates = graph.GatesTo(0).GatesOf(4);        // 6, 7, 8, 3: every way home passes these
        var loops = graph.ShortestLoops();              // for each shape, the steps of its shortest loop
        #endregion

        Assert.Equal((2, "Chute", 5), (passage.Source, passage.Step.Name, passage.Target));
        Assert.Equal((2, 6, -1), (there, back, groupoid.DistancesBack()[5]));
        Assert.Equal(new DiameterBounds(6, 6, 4, 0), diameter);
        Assert.Equal(5, bridges);
        Assert.All(graph.Bridges(), bridge => Assert.Equal(("Wheel", null), (bridge.There.Step.Name, bridge.Back)));
        Assert.Equal([6, 7, 8, 3], gates.ToArray());
        Assert.Equal([1, 1, 1, 1, 1, 1, 3, 3], loops.Order().ToArray());
    }

    [Fact]
    public void Loops()
    {
        var path = Repository.PathOf("docs/workshop/weir-gate.fuse.json");

        #region Model.Loops
        var group = ShapeGroupoid.Explore(MechanismFile.Load(path)).VertexGroupAt(0);
        var basis = LoopBasis.Of(group);
        var first = basis.Loops[0];

        var word = first.ToString();              // U' R' R' U
        var cycles = first.CycleType.ToString();  // 2^10
        var blocks = first.DescribeBlocks();      // ([UF UFR] [DR DFR]): these two trade places
        var longest = basis.LongestLength;        // 8, and proven: shorter loops alone generate less
        #endregion

        Assert.Equal("U' R' R' U", word);
        Assert.Equal("2^10", cycles);
        Assert.Equal("([UF UFR] [DR DFR])", blocks);
        Assert.Equal(8, longest);
        Assert.True(basis.IsShortest);
    }
}
