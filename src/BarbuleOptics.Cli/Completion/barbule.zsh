#compdef barbule
# Tab completion of barbule for zsh. In ~/.zshrc, after compinit: source <(barbule completion zsh)
_barbule() {
    local line="${(j: :)words[1,CURRENT-1]} $PREFIX" text
    local -a found
    compset -P '--*='
    for text in ${(f)"$(${~words[1]} "[suggest:${#line}]" "$line" 2>/dev/null)"}; do
        # Options are offered once a dash is typed; before that, file names stay in reach.
        if [[ $text != -* || $PREFIX == -* ]]; then
            found+=("$text")
        fi
    done
    compadd -- $found || _files
}
compdef _barbule barbule
