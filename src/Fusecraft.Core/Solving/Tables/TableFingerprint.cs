using System.Security.Cryptography;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What a table file must agree with: the mechanism, its goal where distances lead there, the metric, and the numbering of the states.</summary>
internal static class TableFingerprint
{
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    public static byte[] Of(StateNumbering numbering, Metric metric, DistanceOrigin origin)
    {
        var mechanism = numbering.Mechanism;
        using var text = new MemoryStream();
        using var writer = new BinaryWriter(text);
        writer.Write(mechanism.Board.Fingerprint());
        foreach (var step in mechanism.Steps)
        {
            writer.Write(step.Name);
            writer.Write(step.Permutation.ToString());
        }

        writer.Write(metric.ToString());
        foreach (var (turn, weight) in metric.WeightsByTurn)
        {
            writer.Write(turn);
            writer.Write(weight);
        }

        writer.Write((int)origin);
        if (origin == DistanceOrigin.ToGoal)
        {
            writer.Write((int)mechanism.Goal.Kind);
            foreach (var name in mechanism.Goal.Names)
            {
                writer.Write(name);
            }

            foreach (var colour in mechanism.Goal.Kind == GoalKind.Colours ? mechanism.ColourOfSite : [])
            {
                writer.Write(colour);
            }
        }

        writer.Write(numbering.Group.BaseShape);
        writer.Write(numbering.Count);
        var chain = numbering.Group.Group.Chain;
        for (var level = 0; level < chain.Base.Length; level++)
        {
            foreach (var point in chain.Orbit(level))
            {
                writer.Write(point);
                writer.Write(chain.Representative(level, point).ToString());
            }
        }

        writer.Flush();
        return SHA256.HashData(text.ToArray());
    }
}
