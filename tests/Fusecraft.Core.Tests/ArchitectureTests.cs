using System.Text;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests;

/// <summary>Holds the layers: each namespace of the library uses only those above it.</summary>
public class ArchitectureTests
{
    private static readonly string[] _layers = ["Permutations", "Groups", "Mechanisms", "Geometry", "Groupoids", "Solving", "Surveys", "Reporting"];

    private static readonly (string User, string Used)[] _barred = [("Geometry", "Groups"), ("Groupoids", "Geometry")];

    [Fact]
    public void Every_type_lies_in_one_of_the_layers()
    {
        var outside = typeof(Permutation).Assembly.GetTypes()
            .Where(type => type.Namespace?.StartsWith("Fusecraft", StringComparison.Ordinal) == true && !_layers.Contains(Layer(type)));
        Assert.Empty(outside);
    }

    [Fact]
    public void No_layer_refers_to_one_that_it_may_not_know()
    {
        var offences =
            from type in typeof(Permutation).Assembly.GetTypes()
            let user = Layer(type)
            where user is not null
            from reference in TypeReferences.Of(type)
            let used = Layer(reference)
            where used is not null && !MayUse(user, used)
            select $"{type.FullName} refers to {reference.FullName}";
        Assert.Empty(offences);
    }

    [Theory]
    [InlineData("Groups", "Permutations", true)]
    [InlineData("Groups", "Groups", true)]
    [InlineData("Permutations", "Groups", false)]
    [InlineData("Geometry", "Mechanisms", true)]
    [InlineData("Geometry", "Groups", false)]
    [InlineData("Groupoids", "Geometry", false)]
    [InlineData("Solving", "Reporting", false)]
    [InlineData("Reporting", "Geometry", true)]
    public void A_layer_may_use_those_above_it_except_the_barred(string user, string used, bool may) => Assert.Equal(may, MayUse(user, used));

    [Fact]
    public void References_inside_code_are_found()
    {
        var found = typeof(Sample).GetNestedTypes(System.Reflection.BindingFlags.NonPublic).Append(typeof(Sample)).SelectMany(TypeReferences.Of).ToHashSet();
        Assert.Contains(typeof(StringBuilder), found);              // made in a lambda only
        Assert.Contains(typeof(Version), found);                    // a static call in an iterator only
        Assert.Contains(typeof(InvalidTimeZoneException), found);   // caught only
        Assert.Contains(typeof(Uri), found);                        // in typeof, as a type argument, only
        Assert.Contains(typeof(CycleWalk), TypeReferences.Of(typeof(Permutation)));
    }

    private static bool MayUse(string user, string used) =>
        Array.IndexOf(_layers, used) <= Array.IndexOf(_layers, user) && !_barred.Contains((user, used));

    private static string? Layer(Type type) =>
        type.Assembly == typeof(Permutation).Assembly && type.Namespace?.Split('.') is ["Fusecraft", .. var rest] ? string.Join('.', rest) : null;

    private sealed class Sample
    {
        public static Func<int, string> Lambda() => static i =>
        {
            switch (i)
            {
                case 0: return "";
                case 1: return "one";
                case 2: return typeof(List<Uri>).Name;
                default: return new StringBuilder().Append(i).ToString();
            }
        };

        public static IEnumerable<string> Iterator()
        {
            yield return Version.Parse("1.2").ToString();
        }

        public static bool Catches()
        {
            try
            {
                return Iterator().Any();
            }
            catch (InvalidTimeZoneException)
            {
                return false;
            }
        }
    }
}
