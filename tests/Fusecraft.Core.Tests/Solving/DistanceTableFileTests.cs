using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

public sealed class DistanceTableFileTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory().FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    public static TheoryData<string> Metrics => ["step", "run", "weights"];

    [Theory]
    [MemberData(nameof(Metrics))]
    public void A_table_that_was_written_and_read_is_the_same(string metric)
    {
        var numbering = StateNumbering.Of(Make.Board(3, 3));
        var options = Options(metric);
        var table = DistanceTable.Build(numbering, options);
        var path = Path.Combine(_folder, "board" + DistanceTable.FileExtension);
        table.Save(path);
        using var file = File.OpenRead(path);
        var read = DistanceTable.Load(StateNumbering.Of(Make.Board(3, 3)), file, options);
        using var mapped = DistanceTable.Open(numbering, path, options);
        Assert.Equal(table.Counts.ToArray(), read.Counts.ToArray());
        Assert.Equal(table.Counts.ToArray(), mapped.Counts.ToArray());
        var random = new SeededRandom(1);
        for (var i = 0; i < 500; i++)
        {
            var number = random.NextInt32((int)numbering.Count);
            Assert.Equal(table.DistanceOf(number), read.DistanceOf(number));
            Assert.Equal(table.DistanceOf(number), mapped.DistanceOf(number));
        }
    }

    [Theory]
    [MemberData(nameof(Metrics))]
    public void A_changed_byte_anywhere_is_an_error(string metric)
    {
        var numbering = StateNumbering.Of(Make.Board(2, 2));
        var bytes = Written(numbering, metric);
        for (var at = 0; at < bytes.Length; at++)
        {
            var damaged = (byte[])bytes.Clone();
            damaged[at] ^= 0x24;
            Assert.Throws<InvalidDataException>(() => Load(numbering, damaged, metric));
            File.WriteAllBytes(Path.Combine(_folder, "damaged"), damaged);
            Assert.Throws<InvalidDataException>(() => DistanceTable.Open(numbering, Path.Combine(_folder, "damaged"), Options(metric)));
        }
    }

    [Theory]
    [MemberData(nameof(Metrics))]
    public void A_file_that_ends_too_early_or_goes_on_is_an_error(string metric)
    {
        var numbering = StateNumbering.Of(Make.Board(2, 2));
        var bytes = Written(numbering, metric);
        for (var length = 0; length < bytes.Length; length++)
        {
            Assert.Throws<InvalidDataException>(() => Load(numbering, bytes[..length], metric));
        }

        File.WriteAllBytes(Path.Combine(_folder, "long"), [.. bytes, 0]);
        Assert.Throws<InvalidDataException>(() => DistanceTable.Open(numbering, Path.Combine(_folder, "long"), Options(metric)));
    }

    [Fact]
    public void A_table_of_another_mechanism_metric_sense_or_goal_is_an_error()
    {
        var numbering = StateNumbering.Of(Make.Board(2, 2));
        var bytes = Written(numbering, "step");
        Assert.Contains("another", Assert.Throws<InvalidDataException>(() => Load(StateNumbering.Of(Make.Board(3, 2)), bytes, "step")).Message, StringComparison.Ordinal);
        Assert.Throws<InvalidDataException>(() => Load(numbering, bytes, "run"));
        Assert.Throws<InvalidDataException>(() => DistanceTable.Load(numbering, new MemoryStream(bytes), new DistanceOptions { Origin = DistanceOrigin.FromBase }));
        var other = Mechanism.Create(new MechanismDefinition { Name = "board", Family = new BoardFamily(2, 2, []), Goal = Goal.Shape });
        Assert.Throws<InvalidDataException>(() => Load(StateNumbering.Of(other), bytes, "step"));
        Assert.Throws<InvalidDataException>(() => Load(numbering, "not a table at all, only text"u8.ToArray(), "step"));
    }

    private static DistanceOptions Options(string metric) => new() { Metric = metric switch { "run" => Metric.Run, "weights" => Metric.Weights([]), _ => Metric.Step } };

    private static DistanceTable Load(StateNumbering numbering, byte[] bytes, string metric) => DistanceTable.Load(numbering, new MemoryStream(bytes), Options(metric));

    private static byte[] Written(StateNumbering numbering, string metric)
    {
        using var stream = new MemoryStream();
        DistanceTable.Build(numbering, Options(metric)).Save(stream);
        return stream.ToArray();
    }
}
