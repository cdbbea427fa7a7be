namespace Fusecraft.Solving;

/// <summary>How far the making of a distance table has come.</summary>
/// <param name="Distance">The distance whose states have all been found.</param>
/// <param name="StatesReached">The states at this distance or nearer.</param>
/// <param name="StateCount">All states.</param>
public readonly record struct DistanceProgress(int Distance, long StatesReached, long StateCount);
