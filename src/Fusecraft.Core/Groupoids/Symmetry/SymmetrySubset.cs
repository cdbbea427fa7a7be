namespace Fusecraft.Groupoids;

/// <summary>A growing subgroup of the listed symmetries.</summary>
internal sealed class SymmetrySubset
{
    private readonly SymmetryTable _table;
    private readonly List<int> _generators = [];
    private readonly bool[] _isMember;

    public SymmetrySubset(SymmetryTable table)
    {
        _table = table;
        _isMember = new bool[table.Count];
        _isMember[0] = true;
        Members = [0];
    }

    /// <summary>The members, the identity first.</summary>
    public List<int> Members { get; private set; }

    public bool Contains(int member) => _isMember[member];

    /// <summary>Makes the subgroup large enough to hold a member.</summary>
    public void Add(int member)
    {
        if (_isMember[member])
        {
            return;
        }

        _generators.Add(member);
        Members = [0];
        Array.Clear(_isMember);
        _isMember[0] = true;
        for (var i = 0; i < Members.Count; i++)
        {
            foreach (var generator in _generators)
            {
                var next = _table.Product(Members[i], generator);
                if (!_isMember[next])
                {
                    _isMember[next] = true;
                    Members.Add(next);
                }
            }
        }
    }
}
