namespace Fusecraft.Cli;

/// <summary>What the command's exit code says.</summary>
internal static class ExitCodes
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>An honest negative answer: not reachable, no word that short, a barred step.</summary>
    public const int Negative = 1;

    /// <summary>Wrong usage.</summary>
    public const int Usage = 2;

    /// <summary>Bad input: a file that is wrong or cannot be read or written, a state or word that is none.</summary>
    public const int BadInput = 3;

    /// <summary>A budget ended the work.</summary>
    public const int BudgetEnded = 4;

    /// <summary>A fault of ours.</summary>
    public const int Fault = 70;

    /// <summary>Interrupted.</summary>
    public const int Interrupted = 130;

    /// <summary>The more serious of two codes of one run over several files: bad input before an ended budget before done.</summary>
    public static int MoreSerious(int first, int second) => Weight(first) >= Weight(second) ? first : second;

    private static int Weight(int code) => code switch
    {
        Done => 0,
        Negative => 1,
        BudgetEnded => 2,
        BadInput => 3,
        _ => 4,
    };
}
