namespace Fusecraft.Solving;

/// <summary>How far the distribution of a random walk after some turns is from what it should be: total variation distances, from 0 (alike) to 1 (nothing in common).</summary>
/// <remarks>A distance of d means that somebody who bets on any property of the state wins at most d more often than after a fair scramble, and by the best property exactly so much.</remarks>
/// <param name="Turns">The number of turns.</param>
/// <param name="FromUniform">The distance from all states being equally likely.</param>
/// <param name="FromStationary">The distance from the walk's own stationary distribution. Never grows.</param>
/// <param name="FromLimit">
/// The distance from what the walk tends to along the numbers of turns that are alike modulo its period; the same as <paramref name="FromStationary"/> where the period is 1. Never grows, and tends to 0. Its mean over
/// as many numbers of turns in a row as the period is the distance from the stationary distribution when the number of turns is drawn from these.
/// </param>
public readonly record struct WalkDistance(int Turns, double FromUniform, double FromStationary, double FromLimit);
