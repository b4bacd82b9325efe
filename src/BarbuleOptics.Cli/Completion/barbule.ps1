# Tab completion of barbule for PowerShell. In $PROFILE: barbule completion powershell | Out-String | Invoke-Expression
Register-ArgumentCompleter -Native -CommandName barbule -ScriptBlock {
    param($word, $command, $cursor)
    $length = $cursor - $command.Extent.StartOffset
    $line = $command.ToString().PadRight($length).Substring(0, $length)
    $option = ''
    if ($word -match '^(--[^=]+=)(.*)$') { $option = $Matches[1]; $word = $Matches[2] }
    # Options are offered once a dash is typed; before that, file names stay in reach.
    & $command.GetCommandName() "[suggest:$length]" $line 2>$null |
        Where-Object { $_ -and $_.StartsWith($word) -and ($word.StartsWith('-') -or -not $_.StartsWith('-')) } |
        ForEach-Object { [System.Management.Automation.CompletionResult]::new($option + $_, $_, 'ParameterValue', $_) }
}
