using System.Numerics;
using FsCheck;
using FsCheck.Xunit;
using Fusecraft.Groups;

namespace Fusecraft.Tests.Groups;

public class FactoredIntegerTests
{
    [Property]
    public bool The_value_is_the_product_of_the_factors(PositiveInt[] factors)
    {
        int[] numbers = [.. factors.Select(factor => factor.Get)];
        var product = FactoredInteger.FromFactors(numbers);
        return product.Value == numbers.Aggregate(BigInteger.One, (a, b) => a * b) && FactoredInteger.Parse(product.ToString()) == product;
    }

    [Property]
    public bool Factored_products_multiply(PositiveInt a, PositiveInt b) =>
        FactoredInteger.FromFactors(a.Get) * FactoredInteger.FromFactors(b.Get) == FactoredInteger.FromFactors(a.Get, b.Get);

    [Theory]
    [InlineData("2^27·3^14·5^3·7^2·11", "43252003274489856000", "2^27·3^14·5^3·7^2·11")]
    [InlineData(" 11 * 2^4 * 3^2.5", "7920", "2^4·3^2·5·11")]
    [InlineData("2*2*2", "8", "2^3")]
    [InlineData("1", "1", "1")]
    [InlineData("2147483647", "2147483647", "2147483647")]
    public void Factored_text_is_read_and_written(string text, string value, string canonical)
    {
        var factored = FactoredInteger.Parse(text);

        Assert.Equal(BigInteger.Parse(value, null), factored.Value);
        Assert.Equal(canonical, factored.ToString());
        Assert.Equal(canonical, $"{factored}");
    }

    [Theory]
    [InlineData("")]
    [InlineData("4")]
    [InlineData("2^0")]
    [InlineData("2^")]
    [InlineData("2··3")]
    [InlineData("2^-1")]
    [InlineData("2·1")]
    [InlineData("2^1000001")]
    [InlineData("2^1000000·2")]
    [InlineData("2147483648")]
    [InlineData("2 3")]
    public void Other_text_is_refused(string text)
    {
        Assert.False(FactoredInteger.TryParse(text, null, out _));
        Assert.Throws<FormatException>(() => FactoredInteger.Parse(text));
    }

    [Fact]
    public void The_default_is_one()
    {
        Assert.True(default(FactoredInteger).Value.IsOne);
        Assert.Equal(default, FactoredInteger.FromFactors(1, 1));
        Assert.Throws<ArgumentException>(() => FactoredInteger.FromFactors(0));
    }
}
