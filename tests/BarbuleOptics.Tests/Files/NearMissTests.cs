using BarbuleOptics.Files;
using Xunit;

namespace BarbuleOptics.Tests.Files;

public sealed class NearMissTests
{
    // kitten/sitting 3 and saturday/sunday 3 are the usual textbook examples; CA/ABC 3 is the usual one of optimal string alignment.
    [Theory]
    [InlineData("kitten", "sitting", 3)]
    [InlineData("saturday", "sunday", 3)]
    [InlineData("ca", "abc", 3)]
    [InlineData("abcd", "acbd", 1)]
    [InlineData("", "abc", 3)]
    [InlineData("abc", "", 3)]
    [InlineData("same", "same", 0)]
    public void Distance_matches_textbook_examples(string left, string right, int distance)
    {
        Assert.Equal(distance, NearMiss.Distance(left, right));
        Assert.Equal(distance, NearMiss.Distance(right, left));
    }

    [Theory]
    [InlineData("diamter", "diameter")]
    [InlineData("Keratin", "keratin")]
    [InlineData("staggerd", "staggered")]
    [InlineData("eumelannin", "eumelanin")]
    [InlineData("gold", null)]
    [InlineData("x", null)]
    [InlineData("", null)]
    public void Only_a_near_word_is_suggested(string word, string? expected)
        => Assert.Equal(expected, NearMiss.Find(word, ["diameter", "keratin", "staggered", "eumelanin", "n"]));
}
