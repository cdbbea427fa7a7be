using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# sample of the page on the file format; the region is the text shown there.</summary>
public class FileFormatSamples
{
    [Fact]
    public void Build()
    {
        var path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName() + MechanismFile.Extension);

        #region FileFormat.Build
        var basin = MechanismBuilder.Custom("Lock basin", 6)
            .Turn("A", "(1 2 3)", turn => turn.Needs("gap@1"))
            .Turn("B", "(3 4)(5 6)", turn => turn.Carries("2").BarredBy("pin@6").OneWay())
            .Turn("C", "(2 5)", turn => turn.AnyOf(first => first.Needs("gap@2"), second => second.BarredBy("pin@1")).Back(back => back.Needs("gap@5")))
            .Block("1", "2")
            .Mark("gap", "1")
            .Mark("pin", "4", "5")
            .Build();
        MechanismFile.Save(basin, path);
        #endregion

        Assert.Equal(MechanismFile.Write(basin), MechanismFile.Write(MechanismFile.Load(path)));
        File.Delete(path);
    }
}
