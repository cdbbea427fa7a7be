namespace Fusecraft.Solving;

/// <summary>All states of a region, through a table of arriving steps row by row: within a row, words of states go to words.</summary>
internal sealed class NumberedWalkSpace(StateNumbering numbering, WalkRates rates, int threads, CancellationToken cancellation) : WalkSpace(rates, (int)numbering.Count)
{
    private readonly RowTable _rows = numbering.Tabulate(rates.Arriving, threads, cancellation);

    public override int Unit => _rows.WordStates;

    public override int Source(int state, int slot) => (int)_rows.After(state, slot);

    protected override void Add(double[] rates, double[] from, double[] to, int first, int last)
    {
        for (var at = first; at < last;)
        {
            var row = at / _rows.RowStates;
            var start = row * _rows.RowStates;
            var end = Math.Min(last, start + _rows.RowStates);
            var place = start / OfShape;
            for (var slot = 0; slot < _rows.Slots; slot++)
            {
                if (rates[(place * _rows.Slots) + slot] is > 0 and var rate)
                {
                    var source = from.AsSpan(_rows.TargetRow(row, slot) * _rows.RowStates, _rows.RowStates);
                    AddWords(_rows.WordMap(row, slot), rate, source, to.AsSpan(at, end - at), (at - start) / _rows.WordStates);
                }
            }

            at = end;
        }
    }

    private void AddWords(ReadOnlySpan<uint> map, double rate, ReadOnlySpan<double> source, Span<double> target, int word)
    {
        for (var at = 0; at < target.Length; at += _rows.WordStates, word++)
        {
            var entry = map[word];
            var states = source.Slice((int)(entry >> 5), _rows.WordStates);
            var places = _rows.Places(entry);
            var sums = target.Slice(at, _rows.WordStates);
            for (var i = 0; i < places.Length; i++)
            {
                sums[i] += rate * states[places[i]];
            }
        }
    }
}
