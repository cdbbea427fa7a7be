using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Chooses coordinates and builds tables of them.</summary>
internal static class PruningChoice
{
    public static List<PruningTable> Build(Shape goal, Metric metric, PruningOptions options, CancellationToken cancellation) => throw new NotImplementedException();
}
