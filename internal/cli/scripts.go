package cli

// scripts holds the completion script of each shell. Where hearduty offers nothing, paths are completed.
var scripts = map[string]string{
	"bash": `# hearduty completion for bash
_hearduty() {
    local IFS=$'\n'
    COMPREPLY=($(hearduty __complete "${COMP_WORDS[@]:1:COMP_CWORD}" 2>/dev/null))
}
complete -o default -F _hearduty hearduty
`,
	"zsh": `#compdef hearduty
# hearduty completion for zsh
_hearduty() {
    local -a found
    found=(${(f)"$(hearduty __complete "${(@)words[2,CURRENT]}" 2>/dev/null)"})
    if (( ${#found} )); then
        compadd -- $found
    else
        _files
    fi
}
if (( $+functions[compdef] )); then compdef _hearduty hearduty; fi
`,
	"fish": `# hearduty completion for fish
function __hearduty_complete
    set -l typed (commandline -opc)
    hearduty __complete $typed[2..-1] (commandline -ct) 2>/dev/null
end
function __hearduty_offers
    test -n "$(__hearduty_complete)"
end
complete -c hearduty -n __hearduty_offers -f -a '(__hearduty_complete)'
`,
}
