namespace BarbuleOptics.Files;

/// <summary>Finds the word that a user most likely meant.</summary>
public static class NearMiss
{
    private const int MostLetters = 64;

    /// <summary>The candidate nearest to <paramref name="word"/>, letter case aside, when it is near enough to be meant:
    /// at most one edit for every three letters, and at least one allowed. Of equally near ones the first; null when none is.</summary>
    public static string? Find(string word, IEnumerable<string> candidates)
    {
        ArgumentNullException.ThrowIfNull(word);
        ArgumentNullException.ThrowIfNull(candidates);
        if (word.Length is 0 or > MostLetters)
            return null;
        string? nearest = null;
        int least = Math.Max(1, word.Length / 3) + 1;
        foreach (string candidate in candidates.Where(candidate => candidate.Length <= MostLetters))
        {
            int distance = Distance(word.ToUpperInvariant(), candidate.ToUpperInvariant());
            // A word of one or two letters that shares none of them is no near miss.
            if (distance < least && distance < Math.Max(word.Length, candidate.Length))
                (nearest, least) = (candidate, distance);
        }
        return nearest;
    }

    /// <summary>Least number of letters to insert, delete, replace or swap with their neighbor (optimal string alignment).</summary>
    /// <remarks>Levenshtein (1966), with the neighbor swap of Damerau (1964), Comm. ACM 7:171.</remarks>
    public static int Distance(string left, string right)
    {
        ArgumentNullException.ThrowIfNull(left);
        ArgumentNullException.ThrowIfNull(right);
        int[] beforeLast = new int[right.Length + 1], last = [.. Enumerable.Range(0, right.Length + 1)], row = new int[right.Length + 1];
        for (int i = 1; i <= left.Length; i++)
        {
            row[0] = i;
            for (int j = 1; j <= right.Length; j++)
            {
                int replaced = last[j - 1] + (left[i - 1] == right[j - 1] ? 0 : 1);
                row[j] = Math.Min(replaced, Math.Min(last[j], row[j - 1]) + 1);
                if (i > 1 && j > 1 && left[i - 1] == right[j - 2] && left[i - 2] == right[j - 1])
                    row[j] = Math.Min(row[j], beforeLast[j - 2] + 1);
            }
            (beforeLast, last, row) = (last, row, beforeLast);
        }
        return last[right.Length];
    }
}
