# Shared by the scripts that open the real window; sourced, not run, after `room` is an empty folder of the caller's.

server='' window=''

alive() { kill -0 "$1" 2>/dev/null; }

# give_up WHAT: says what went wrong and what the program said, and ends the script.
give_up() {
    printf 'window: %s\n' "$1" >&2
    sed 's/^/    /' "$room/log" >&2
    exit 1
}

# Ends only what was started here.
clean_up() {
    if [ -n "$window" ]; then kill "$window" 2>/dev/null || true; fi
    if [ -n "$server" ]; then
        kill "$server" 2>/dev/null || true
        wait "$server" 2>/dev/null || true
    fi
    rm -rf "$room"
}

# start_display: a display of its own, whose number the server chooses. -fbdir keeps the screen in a file, in the format of xwd.
start_display() {
    local tenths
    touch "$room/number" "$room/log"
    Xvfb -displayfd 3 -screen 0 1280x800x24 -nolisten tcp -fbdir "$room" 3>"$room/number" 2>"$room/log" &
    server=$!
    for ((tenths = 0; tenths < 300; tenths++)); do
        if [ -s "$room/number" ]; then break; fi
        alive "$server" || give_up 'Xvfb did not start'
        sleep 0.1
    done
    [ -s "$room/number" ] || give_up 'Xvfb gave no display'
    DISPLAY=:$(cat "$room/number")
    export DISPLAY
    unset WAYLAND_DISPLAY WAYLAND_SOCKET
    # A home of its own: neither the last design nor any setting of whoever runs this.
    mkdir -p "$room/home"
}

# at_home COMMAND...: runs a program with that home and drivers in software.
at_home() {
    env HOME="$room/home" XDG_CONFIG_HOME="$room/home" XDG_DATA_HOME="$room/home" XDG_STATE_HOME="$room/home" \
        LIBGL_ALWAYS_SOFTWARE=1 "$@"
}

# await_window SECONDS: sets `id` to the window that the program `window` opens.
await_window() {
    local tenths
    id=''
    for ((tenths = 0; tenths < $1 * 10; tenths++)); do
        id=$(xdotool search --onlyvisible --name zonewright 2>/dev/null | head -n 1 || true)
        if [ -n "$id" ]; then return 0; fi
        alive "$window" || give_up 'the program ended before a window appeared'
        sleep 0.1
    done
    give_up "no window appeared in $1 s"
}

# close_window SECONDS: closes it with its own key and looks at the exit status.
close_window() {
    local tenths status=0
    # With no window manager nobody gives the window the keyboard, so it is given here.
    xdotool windowfocus "$id"
    sleep 0.5
    xdotool key --clearmodifiers ctrl+q
    for ((tenths = 0; tenths < $1 * 10; tenths++)); do
        alive "$window" || break
        sleep 0.1
    done
    if alive "$window"; then give_up "the window did not close in $1 s"; fi
    wait "$window" || status=$?
    window=''
    [ "$status" -eq 0 ] || give_up "the program ended with status $status"
}
