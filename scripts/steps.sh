# Shared by the scripts beside it; sourced, not run.

# What the window loads when it opens. The program is linked against none of it, and builds without.
window_packages=(
    libgl1 libglx-mesa0 libgl1-mesa-dri libegl1
    libx11-6 libx11-xcb1 libxcursor1 libxi6 libxrender1
    libxkbcommon0 libxkbcommon-x11-0 libwayland-client0 libwayland-egl1
)
# What opens a window where there is no display, presses a key in it, and draws it in software when OpenGL is missing.
smoke_packages=(xvfb xdotool libvulkan1 mesa-vulkan-drivers)

# step NAME COMMAND...: says what begins; when it fails, says which step it was and ends the script.
step() {
    local name=$1 status=0
    shift
    printf '\n== %s\n' "$name"
    "$@" || status=$?
    if [ "$status" -ne 0 ]; then
        printf '\nFAILED: %s (exit status %s)\n' "$name" "$status" >&2
        exit "$status"
    fi
}

# missing PACKAGE...: prints those that are not installed.
missing() {
    local package
    for package in "$@"; do
        case $(dpkg-query --show --showformat='${db:Status-Status}' "$package" 2>/dev/null) in
            installed) ;;
            *) printf '%s\n' "$package" ;;
        esac
    done
}

# need PACKAGE...: installs what is missing. Where that cannot be done, says in one sentence what is missing, and fails.
need() {
    local as_root=() wanted=()
    if ! command -v dpkg-query >/dev/null || ! command -v apt-get >/dev/null; then
        printf 'This system has no apt; what Debian calls %s must be there.\n' "$*" >&2
        return 1
    fi
    mapfile -t wanted < <(missing "$@")
    if [ "${#wanted[@]}" -eq 0 ]; then
        return 0
    fi
    if [ "$(id -u)" -ne 0 ]; then
        if ! command -v sudo >/dev/null; then
            printf 'Missing, and only root can install them: %s\n' "${wanted[*]}" >&2
            return 1
        fi
        as_root=(sudo)
    fi
    printf 'Installing %s\n' "${wanted[*]}"
    # An index that is out of date or partly out of reach may still do; the installation decides.
    "${as_root[@]}" apt-get update -qq || true
    if ! "${as_root[@]}" env DEBIAN_FRONTEND=noninteractive \
        apt-get install -y -qq --no-install-recommends "${wanted[@]}" >/dev/null; then
        printf 'Could not be installed: %s\n' "${wanted[*]}" >&2
        return 1
    fi
}

# need_rust: Rust and a C compiler's linker, without which nothing can be built.
need_rust() {
    if ! command -v cargo >/dev/null; then
        printf 'Missing: Rust %s or newer, with cargo.\n' "$(sed -n 's/^rust-version = "\(.*\)"/\1/p' Cargo.toml)" >&2
        return 1
    fi
    if ! command -v cc >/dev/null; then
        printf 'Missing: a C compiler as cc, which links the program; on Debian, the package gcc with libc6-dev.\n' >&2
        return 1
    fi
}
