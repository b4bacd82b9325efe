using System.CommandLine;
using BarbuleOptics.Cli;
using BarbuleOptics.Tests.Files;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>What the Tab key offers: by the directive that the scripts call, and by the scripts in the shells themselves.</summary>
public sealed class CompletionTests
{
    /// <summary>A line up to the cursor, what must be offered, what must not.</summary>
    public static TheoryData<string, string, string> Lines => new()
    {
        { "", "predict materials sample completion", "" },
        { "pre", "predict", "materials" },
        { "predict --", "--angles --mixing --set --out", "predict" },
        { "predict --an", "--angles", "--mixing" },
        { "predict throat.toml --illum", "--illuminant", "--mixing" },
        { "predict --mixing ", "mean-index mean-permittivity form-birefringence form-birefringence-2 maxwell-garnett maxwell-garnett-2 bruggeman bruggeman-2", "D65" },
        { "predict --mixing max", "maxwell-garnett maxwell-garnett-2", "bruggeman" },
        { "predict --mixing=max", "maxwell-garnett maxwell-garnett-2", "bruggeman" },
        { "predict --set barbule.surround=water --set 'layer1.lumen=0' --obs", "--observer", "--mixing" },
        { "predict --set \"barbule.matrix={ n = 1.5 }\" --mixing max", "maxwell-garnett maxwell-garnett-2", "bruggeman" },
        { "predict --set ", "", "throat.toml" },
        { "predict --mixing=", "maxwell-garnett bruggeman", "D65" },
        { "predict throat.toml --illuminant D", "D50 D55 D65 D75", "A" },
        { "predict --observer ", "1931-2deg 1964-10deg", "Cie1931TwoDegree D65" },
        { "predict --polarization ", "unpolarized s p", "Unpolarized S P" },
        { "predict --solver ", "auto multilayer grating", "Auto D65" },
        { "predict --solver gra", "grating", "auto" },
        { "predict --vision ", "average-ultraviolet average-violet peafowl", "D65" },
        { "predict --summ", "--summation", "--set" },
        { "predict --over", "--overlay", "--mixing" },
        { "predict --force ", "", "True False" },
        { "predict --json ", "", "True False" },
        { "predict /", "", "/h /?" },
        { "materials ", "keratin eumelanin water", "D65" },
        { "materials ker", "keratin", "water" },
        { "sample --f", "--force", "predict" },
        { "completion ", "bash zsh powershell", "fish" },
        { "predict --materials=", "", "keratin" },
    };

    [Theory]
    [MemberData(nameof(Lines))]
    public async Task The_directive_offers_what_can_follow(string line, string offered, string missing)
    {
        // The parser takes the first word for the command's only where it is the name of the program that runs.
        string typed = $"{RootCommand.ExecutableName} {line}";
        string[] words = (await Barbule.Call($"[suggest:{typed.Length}]", typed)).Good().Output.Split('\n');
        Assert.All(Words(offered), word => Assert.Contains(word, words));
        Assert.All(Words(missing), word => Assert.DoesNotContain(word, words));
    }

    [Fact]
    public async Task Names_of_materials_of_ones_own_are_offered()
    {
        using var folder = new TemporaryFolder();
        await File.WriteAllTextAsync(
            folder["glass.toml"],
            "format = 1\nname = \"sample-glass\"\nunit = \"nm\"\nrange_nm = [300, 900]\nsource = \"invented\"\nobtained = \"invented\"\n[n]\nkind = \"constant\"\nvalue = 1.9\n[k]\nkind = \"constant\"\nvalue = 0.0\n",
            TestContext.Current.CancellationToken);
        string typed = $"{RootCommand.ExecutableName} materials --materials {folder.Path} sample-";
        Assert.Contains("sample-glass\n", (await Barbule.Call($"[suggest:{typed.Length}]", typed)).Good().Output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("bash", "complete -o default -F _barbule barbule")]
    [InlineData("zsh", "compdef _barbule barbule")]
    [InlineData("powershell", "Register-ArgumentCompleter -Native -CommandName barbule")]
    public async Task Each_shell_has_a_script_that_says_where_it_goes(string shell, string registration)
    {
        string script = (await Barbule.Call("completion", shell)).Good().Output;
        Assert.Contains(registration, script, StringComparison.Ordinal);
        Assert.Contains($"barbule completion {shell}", script.Split('\n').First(line => line.StartsWith("# ", StringComparison.Ordinal)), StringComparison.Ordinal);
    }

    // The stock help shows completions in place of a name.
    [Theory]
    [InlineData("--help", "  materials <NAME>")]
    [InlineData("materials --help", "\n  <NAME> ")]
    [InlineData("completion --help", "\n  <SHELL> ")]
    public async Task Help_names_arguments_and_does_not_list_their_values(string arguments, string words)
        => Assert.Contains(words, (await Barbule.Call(arguments.Split(' '))).Good().Output.ReplaceLineEndings("\n"), StringComparison.Ordinal);

    [Fact]
    public async Task Help_says_how_a_script_is_used()
        => Assert.Contains("Example:\n  eval \"$(barbule completion bash)\"", (await Barbule.Call("completion", "--help")).Good().Output.ReplaceLineEndings("\n"), StringComparison.Ordinal);

    [Fact]
    public async Task An_unknown_shell_is_refused_with_a_hint()
        => Assert.Equal("barbule: SHELL: found \"bahs\"; allowed bash, zsh, powershell; did you mean bash?", (await Barbule.Call("completion", "bahs")).Refusal(2));

    // The variables are those that bash sets for a completion function (Bash Reference Manual, section 8.6, Programmable Completion).
    // Bash splits words at "=", too (COMP_WORDBREAKS).
    [Fact]
    public async Task The_script_completes_in_bash()
    {
        string bash = OutsideProgram.Find("bash", "bash");
        using var folder = new TemporaryFolder();
        await File.WriteAllTextAsync(folder["completion.bash"], (await Barbule.Call("completion", "bash")).Good().Output, TestContext.Current.CancellationToken);
        await File.WriteAllTextAsync(folder["barbule"], $"#!/bin/sh\nexec {Barbule.CommandLine} \"$@\"\n", TestContext.Current.CancellationToken);
        await File.WriteAllTextAsync(folder["try.bash"], """
            chmod +x barbule; PATH=$PWD:$PATH; source ./completion.bash
            offer() {
                COMP_LINE=$1; COMP_POINT=${#1}; shift
                COMP_WORDS=("$@"); COMP_CWORD=$(($# - 1))
                _barbule barbule "${COMP_WORDS[COMP_CWORD]}" "${COMP_WORDS[COMP_CWORD - 1]}"
                echo "${COMPREPLY[*]}"
            }
            complete -p barbule
            offer 'barbule ma' barbule ma
            offer 'barbule predict --illuminant D6' barbule predict --illuminant D6
            offer 'barbule predict --mixing=max' barbule predict --mixing = max
            offer 'barbule predict --observer=' barbule predict --observer =
            offer 'barbule predict ' barbule predict ''
            offer 'barbule predict --acc' barbule predict --acc
            offer 'barbule predict thr' barbule predict thr
            """, TestContext.Current.CancellationToken);

        string[] offered = OutsideProgram.Run(bash, folder.Path, "--norc", "try.bash").Split('\n');
        // Nothing is offered for FILE, so that bash falls back to file names ("-o default").
        Assert.Equal(["complete -o default -F _barbule barbule", "materials", "D65", "maxwell-garnett maxwell-garnett-2", "1931-2deg 1964-10deg", "", "--accuracy", "", ""], offered);
    }

    private static string[] Words(string text) => text.Split(' ', StringSplitOptions.RemoveEmptyEntries);
}
