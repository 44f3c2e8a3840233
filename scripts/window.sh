# A real window on a display of its own, drawn by software; sourced by the scripts beside it, not run.

room='' home=() server='' window='' window_id=''

# begin_room: a folder that goes away at the end, with a home in which nobody has set anything.
begin_room() {
    room=$(mktemp -d)
    mkdir "$room/home"
    touch "$room/number" "$room/log"
    home=(
        env HOME="$room/home" XDG_CONFIG_HOME="$room/home" XDG_DATA_HOME="$room/home" XDG_STATE_HOME="$room/home"
        ZONEWRIGHT_STATE_DIR="$room/state" LIBGL_ALWAYS_SOFTWARE=1
    )
    trap end_room EXIT
}

end_room() {
    # Only what was started here.
    if [ -n "$window" ]; then kill "$window" 2>/dev/null || true; fi
    if [ -n "$server" ]; then
        kill "$server" 2>/dev/null || true
        wait "$server" 2>/dev/null || true
    fi
    rm -rf "$room"
}

# give_up WHY: says why, with what the program said, and ends the script.
give_up() {
    printf 'window: %s\n' "$1" >&2
    sed 's/^/    /' "$room/log" >&2
    exit 1
}

alive() { kill -0 "$1" 2>/dev/null; }

# begin_display [WIDTHxHEIGHT]: a display without a driver. The server chooses a free number; -fbdir keeps the screen in a file, in the
# format of xwd.
begin_display() {
    Xvfb -displayfd 3 -screen 0 "${1:-1280x800}x24" -nolisten tcp -fbdir "$room" 3>"$room/number" 2>"$room/log" &
    server=$!
    local tenths
    for ((tenths = 0; tenths < 300; tenths++)); do
        if [ -s "$room/number" ]; then break; fi
        alive "$server" || give_up 'Xvfb did not start'
        sleep 0.1
    done
    [ -s "$room/number" ] || give_up 'Xvfb gave no display'
    DISPLAY=:$(cat "$room/number")
    export DISPLAY
    unset WAYLAND_DISPLAY WAYLAND_SOCKET
}

# at_home COMMAND...: runs a program with the room's home and drivers in software.
at_home() { "${home[@]}" "$@"; }

# begin_window PROGRAM [ARGUMENT...]: starts it at home and waits up to two minutes for its window, which then has the keyboard.
begin_window() {
    # Not through a function: that would be a shell of its own, and its number not that of the program.
    "${home[@]}" "$@" >"$room/log" 2>&1 &
    window=$! window_id=''
    local tenths
    for ((tenths = 0; tenths < 1200; tenths++)); do
        window_id=$(xdotool search --onlyvisible --name zonewright 2>/dev/null | head -n 1 || true)
        if [ -n "$window_id" ]; then break; fi
        alive "$window" || give_up 'the program ended before a window appeared'
        sleep 0.1
    done
    [ -n "$window_id" ] || give_up 'no window appeared in two minutes'
    # With no window manager nobody gives the window the keyboard, so it is given here.
    xdotool windowfocus "$window_id"
    sleep 0.5
}

# press KEYS...: as xdotool names them.
press() { xdotool key --clearmodifiers "$@"; }

# close_window: presses the window's own key and waits up to a minute; it must end well.
close_window() {
    press ctrl+q
    local tenths status=0
    for ((tenths = 0; tenths < 600; tenths++)); do
        alive "$window" || break
        sleep 0.1
    done
    if alive "$window"; then give_up 'the window did not close in a minute'; fi
    wait "$window" || status=$?
    window=''
    [ "$status" -eq 0 ] || give_up "the program ended with status $status"
}

# program_of PROFILE: builds the program (dev or release) and prints where it is.
program_of() {
    cargo build --quiet -p zonewright --profile "$1" >&2
    local target folder=$1
    target=$(cargo metadata --format-version 1 --no-deps | sed 's/.*"target_directory":"\([^"]*\)".*/\1/')
    if [ "$folder" = dev ]; then folder=debug; fi
    printf '%s/%s/zonewright\n' "$target" "$folder"
}
