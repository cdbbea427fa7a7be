using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>What is loaded is what was saved; whatever else a file may hold is one clear error.</summary>
public class GraphFileTests
{
    private static readonly Lazy<Mechanism> Domino = new(() => Make.Cube(3, "", "UFR UF"));

    [Fact]
    public void Random_mechanisms_are_loaded_as_they_were_saved()
    {
        for (var seed = 0UL; seed < 300; seed++)
        {
            var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
            var groupoid = ShapeGroupoid.Explore(mechanism, new ExplorationOptions { MaxShapes = 1 + (int)(seed % 7 * 10) });
            IsAs(groupoid, ShapeGroupoid.Load(mechanism, new MemoryStream(Saved(groupoid))));
        }
    }

    [Fact]
    public void A_large_graph_from_any_first_shape_is_loaded_as_it_was_saved()
    {
        var mechanism = Make.Cube(5, "", "1,1,2 1,1,3", "5,2,1 5,3,1", "2,1,5 3,1,5");
        var first = ShapeGroupoid.Explore(mechanism).ShapeAt(77);
        var groupoid = ShapeGroupoid.ExploreFrom(first);
        var loaded = ShapeGroupoid.Load(mechanism, new MemoryStream(Saved(groupoid)));
        Assert.Equal(first, loaded.ShapeAt(0));
        IsAs(groupoid, loaded);
        Assert.True(Saved(groupoid).Length < 200 + (2 * groupoid.ShapeCount));
    }

    [Fact]
    public void More_steps_than_a_byte_can_number_are_loaded_as_they_were_saved()
    {
        var mechanism = Make.Board(9, 9);
        Assert.True(mechanism.Steps.Length > 256);
        var groupoid = ShapeGroupoid.Explore(mechanism);
        IsAs(groupoid, ShapeGroupoid.Load(mechanism, new MemoryStream(Saved(groupoid))));
    }

    [Fact]
    public void A_file_is_mapped_and_an_older_one_replaced()
    {
        var path = Path.Combine(Directory.CreateTempSubdirectory().FullName, "domino" + ShapeGroupoid.FileExtension);
        ShapeGroupoid.Explore(Domino.Value, new ExplorationOptions { MaxShapes = 5 }).Save(path);
        var groupoid = ShapeGroupoid.Explore(Domino.Value);
        groupoid.Save(path);
        IsAs(groupoid, ShapeGroupoid.Load(Domino.Value, path));

        File.AppendAllText(path, "x");
        Says("behind the end", () => ShapeGroupoid.Load(Domino.Value, path));
        File.WriteAllBytes(path, []);
        Says("truncated", () => ShapeGroupoid.Load(Domino.Value, path));
        Assert.Throws<FileNotFoundException>(() => ShapeGroupoid.Load(Domino.Value, path + "x"));
        Directory.Delete(Path.GetDirectoryName(path)!, recursive: true);
    }

    [Fact]
    public void A_graph_may_stand_in_the_middle_of_a_stream()
    {
        var groupoid = ShapeGroupoid.Explore(Domino.Value);
        using var stream = new MemoryStream([1, 2, .. Saved(groupoid), .. Saved(groupoid), 3]) { Position = 2 };
        IsAs(groupoid, ShapeGroupoid.Load(Domino.Value, stream));
        IsAs(groupoid, ShapeGroupoid.Load(Domino.Value, stream));
        Assert.Equal(3, stream.ReadByte());
    }

    [Fact]
    public void A_change_of_any_bit_is_noticed()
    {
        var saved = Saved(ShapeGroupoid.Explore(Domino.Value));
        for (var bit = 0; bit < 8 * saved.Length; bit++)
        {
            var damaged = (byte[])saved.Clone();
            damaged[bit >> 3] ^= (byte)(1 << (bit & 7));
            Assert.Throws<InvalidDataException>(() => ShapeGroupoid.Load(Domino.Value, new MemoryStream(damaged)));
        }
    }

    [Fact]
    public void A_cut_anywhere_is_noticed()
    {
        var saved = Saved(ShapeGroupoid.Explore(Domino.Value));
        for (var length = 0; length < saved.Length; length++)
        {
            Says("truncated", () => ShapeGroupoid.Load(Domino.Value, new MemoryStream(saved[..length])));
        }
    }

    [Fact]
    public void A_file_of_another_kind_or_version_or_mechanism_is_refused()
    {
        var saved = Saved(ShapeGroupoid.Explore(Domino.Value));
        Says("no graph file", () => ShapeGroupoid.Load(Domino.Value, new MemoryStream("{ \"format\": 1 }"u8.ToArray())));
        foreach (var other in new[] { Make.Cube(3, "", "UFR UR"), Make.Cube(3, "U R F D L", "UFR UF"), Make.Cube(4, "", "1,1,1 2,1,1"), Make.Cube(3, "") })
        {
            Says("another mechanism", () => ShapeGroupoid.Load(other, new MemoryStream(saved)));
        }

        saved[8] = 2;
        Says("version 2", () => ShapeGroupoid.Load(Domino.Value, new MemoryStream(saved)));
    }

    [Fact]
    public void A_mechanism_that_moves_the_same_but_tells_something_else_is_the_same_to_a_file()
    {
        var renamed = MechanismBuilder.Cube("Renamed", 3).About("The same.").Block("UFR", "UF").Goal(Goal.Shape).Build();
        Assert.Equal(24, ShapeGroupoid.Load(renamed, new MemoryStream(Saved(ShapeGroupoid.Explore(Domino.Value)))).ShapeCount);
    }

    private static byte[] Saved(ShapeGroupoid groupoid)
    {
        using var stream = new MemoryStream();
        groupoid.Save(stream);
        return stream.ToArray();
    }

    private static void IsAs(ShapeGroupoid one, ShapeGroupoid other)
    {
        Assert.Equal(
            (one.ShapeCount, one.IsComplete, one.FreeTurnCount, one.DeadEndCount, one.StuckShapeCount),
            (other.ShapeCount, other.IsComplete, other.FreeTurnCount, other.DeadEndCount, other.StuckShapeCount));
        Assert.Equal(one.LevelStarts, other.LevelStarts);
        for (var shape = 0; shape < one.ShapeCount; shape++)
        {
            Assert.Equal((one.Parent(shape), one.ParentStep(shape)), (other.Parent(shape), other.ParentStep(shape)));
            Assert.True(one.Store.Key(shape).SequenceEqual(other.Store.Key(shape)) && other.IndexOf(one.ShapeAt(shape)) == shape);
        }
    }

    private static void Says(string words, Action load) => Assert.Contains(words, Assert.Throws<InvalidDataException>(load).Message, StringComparison.Ordinal);
}
