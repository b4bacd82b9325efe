namespace BarbuleOptics.Figures.Layout;

/// <summary>Moves labels in a column apart by as little as needed, keeping their order.</summary>
internal static class LabelSpread
{
    /// <summary>The middles of labels that do not overlap and lie between two limits as far as they fit.</summary>
    /// <param name="wanted">Where the middles would best lie, in any order.</param>
    /// <param name="heights">Heights of the labels, gaps included.</param>
    /// <param name="least">Upper limit of the first label's top.</param>
    /// <param name="most">Lower limit of the last label's bottom.</param>
    /// <remarks>Labels that touch form a block, which sits where its members want it on average (pool adjacent violators, the least-squares
    /// solution).</remarks>
    public static double[] Middles(IReadOnlyList<double> wanted, IReadOnlyList<double> heights, double least, double most)
    {
        int[] order = [.. Enumerable.Range(0, wanted.Count).OrderBy(i => wanted[i]).ThenBy(i => i)];
        var blocks = new List<(double Wish, double Height, int Count)>();
        foreach (int i in order)
        {
            // Wish: where the block's top would best lie, on average over its members.
            (double Wish, double Height, int Count) block = (Held(wanted[i] - heights[i] / 2, heights[i], least, most), heights[i], 1);
            while (blocks.Count > 0 && blocks[^1].Wish + blocks[^1].Height > block.Wish)
            {
                (double Wish, double Height, int Count) above = blocks[^1];
                blocks.RemoveAt(blocks.Count - 1);
                int count = above.Count + block.Count;
                double height = above.Height + block.Height;
                double wish = (above.Wish * above.Count + (block.Wish - above.Height) * block.Count) / count;
                block = (Held(wish, height, least, most), height, count);
            }
            blocks.Add(block);
        }

        var middles = new double[wanted.Count];
        int next = 0;
        foreach ((double wish, _, int count) in blocks)
        {
            double top = wish;
            for (int member = 0; member < count; member++, next++)
            {
                middles[order[next]] = top + heights[order[next]] / 2;
                top += heights[order[next]];
            }
        }
        return middles;
    }

    private static double Held(double top, double height, double least, double most) => Math.Max(least, Math.Min(top, most - height));
}
