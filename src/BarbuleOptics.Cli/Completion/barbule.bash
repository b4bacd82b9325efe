# Tab completion of barbule for bash. In ~/.bashrc: eval "$(barbule completion bash)"
_barbule() {
    local line=${COMP_LINE:0:COMP_POINT} word=${COMP_WORDS[COMP_CWORD]} text
    [[ $word == = ]] && word=
    COMPREPLY=()
    while IFS= read -r text; do
        # Options are offered once a dash is typed; before that, file names stay in reach.
        if [[ -n $text && $text == "$word"* && ( $text != -* || $word == -* ) ]]; then
            COMPREPLY+=("$text")
        fi
    done < <("${1/#\~/$HOME}" "[suggest:${#line}]" "$line" 2>/dev/null)
}
complete -o default -F _barbule barbule
