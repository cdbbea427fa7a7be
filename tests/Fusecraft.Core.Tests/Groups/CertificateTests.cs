using System.Text.Json.Nodes;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groups;

/// <summary>Certificates of order: right ones are accepted, everything else is refused by a step that fails.</summary>
public class CertificateTests
{
    private static readonly PermutationGroup M11 = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5 6 7 8 9 10 11)"), Permutation.Parse("(3 7 11 8)(4 10 5 6)"));

    public static TheoryData<string> Groups => ["", "()", "(1 2)", "(1 2 3 4 5)", "(1 2)(3 4); (1 3)(2 4)", "(1 2 3); (4 5 6); (1 4)(2 5)(3 6)", "(1 2); (1 2); (2 3)", "(1 2 3 4 5 6 7); (2 3 5)(4 7 6)"];

    [Theory]
    [MemberData(nameof(Groups))]
    public void A_certificate_is_accepted_and_states_the_order(string generators)
    {
        var group = PermutationGroup.Generate([.. generators.Split(';', StringSplitOptions.RemoveEmptyEntries).Select(text => Permutation.Parse(text.Trim()))], 8);

        var certificate = OrderCertificate.Parse(group.CertifyOrder().ToJson());

        Assert.Null(CertificateChecker.Check(certificate, group.Generators).FailingStep);
        Assert.Equal(group.Order, certificate.Order);
    }

    // OEIS A075152 (opened): 43252003274489856000 = 2^27·3^14·5^3·7^2·11.
    [Fact]
    public void The_order_of_the_3x3x3_is_certified()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(3, 1));

        var certificate = group.CertifyOrder();

        Assert.True(CertificateChecker.Check(certificate, group.Generators).IsAccepted);
        Assert.Equal("43252003274489856000", certificate.Order.ToString());
    }

    [Fact]
    public void The_same_group_has_the_same_certificate() => Assert.Equal(M11.CertifyOrder().ToJson(), M11.CertifyOrder().ToJson());

    [Fact]
    public void A_certificate_of_another_group_is_refused() => Assert.Equal(
        "The generators of the certificate are not those of the group.",
        CertificateChecker.Check(M11.CertifyOrder(), [Permutation.Parse("(1 2 3)")]).FailingStep);

    [Fact]
    public void A_chain_of_a_subgroup_is_refused()
    {
        // The certificate of the group of the first generator alone, with the second one slipped in.
        var cyclic = PermutationGroup.Generate([M11.Generators[0]], 11).CertifyOrder();
        var forged = new OrderCertificate
        {
            Degree = 11,
            Generators = M11.Generators,
            Elements = [],
            StrongGenerators = cyclic.StrongGenerators,
            Levels = cyclic.Levels,
            Order = cyclic.Order,
        };

        Assert.Equal("Generator 2 does not sift away.", CertificateChecker.Check(forged, M11.Generators).FailingStep);
    }

    [Fact]
    public void A_base_that_is_too_short_is_refused()
    {
        var certificate = M11.CertifyOrder();
        var forged = new OrderCertificate
        {
            Degree = 11,
            Generators = certificate.Generators,
            Elements = certificate.Elements,
            StrongGenerators = certificate.StrongGenerators,
            Levels = certificate.Levels.RemoveAt(3),
            Order = certificate.Order / 8,
        };

        Assert.False(CertificateChecker.Check(forged, M11.Generators).IsAccepted);
    }

    [Fact]
    public void A_thousand_random_corruptions_are_refused()
    {
        var text = M11.CertifyOrder().ToJson();
        var random = new SeededRandom(7);
        for (var i = 0; i < 1000; i++)
        {
            var corrupted = Corrupt(text, random);
            try
            {
                var verdict = CertificateChecker.Check(OrderCertificate.Parse(corrupted), M11.Generators);
                Assert.True(!verdict.IsAccepted, $"Corruption {i} was accepted: {Difference(text, corrupted)}");
                Assert.NotEmpty(verdict.FailingStep);
            }
            catch (FormatException exception)
            {
                Assert.NotEmpty(exception.Message);
            }
        }
    }

    [Theory]
    [InlineData("{}", "missing required properties")]
    [InlineData("[1]", "line 1")]
    [InlineData("null", "found null")]
    public void Text_that_is_no_certificate_is_refused(string json, string message) =>
        Assert.Contains(message, Assert.Throws<FormatException>(() => OrderCertificate.Parse(json)).Message, StringComparison.Ordinal);

    private static string Difference(string text, string corrupted)
    {
        var at = text.Zip(corrupted).TakeWhile(pair => pair.First == pair.Second).Count();
        return $"…{text[Math.Max(0, at - 40)..Math.Min(text.Length, at + 40)]}… became …{corrupted[Math.Max(0, at - 40)..Math.Min(corrupted.Length, at + 40)]}…";
    }

    // Changes one number or one digit of a permutation or of the order, or drops or doubles one entry of a list.
    private static string Corrupt(string text, SeededRandom random)
    {
        var root = JsonNode.Parse(text)!;
        var leaves = new List<JsonNode>();
        var lists = new List<JsonArray>();
        Collect(root);
        if (random.NextInt32(4) == 0)
        {
            var list = lists[random.NextInt32(lists.Count)];
            var at = random.NextInt32(list.Count);
            if (random.NextInt32(2) == 0)
            {
                list.RemoveAt(at);
            }
            else
            {
                list.Insert(at, list[at]!.DeepClone());
            }

            return root.ToJsonString();
        }

        var leaf = leaves[random.NextInt32(leaves.Count)];
        if (leaf.GetValueKind() == System.Text.Json.JsonValueKind.Number)
        {
            leaf.ReplaceWith(leaf.GetValue<int>() + (random.NextInt32(2) == 0 ? 1 : -1) * (1 + random.NextInt32(5)));
        }
        else
        {
            var characters = leaf.GetValue<string>().ToCharArray();
            var digits = Enumerable.Range(0, characters.Length).Where(i => char.IsAsciiDigit(characters[i])).ToList();
            var at = digits[random.NextInt32(digits.Count)];
            characters[at] = (char)('0' + ((characters[at] - '0' + 1 + random.NextInt32(9)) % 10));
            leaf.ReplaceWith(new string(characters));
        }

        return root.ToJsonString();

        void Collect(JsonNode node)
        {
            switch (node)
            {
                case JsonObject members:
                    foreach (var (name, value) in members)
                    {
                        if (name is not ("format" or "degree"))
                        {
                            Collect(value!);
                        }
                    }

                    break;
                case JsonArray list:
                    if (list.Count > 0)
                    {
                        lists.Add(list);
                    }

                    foreach (var entry in list)
                    {
                        Collect(entry!);
                    }

                    break;
                default:
                    leaves.Add(node);
                    break;
            }
        }
    }
}
