//! How long frames take, and how much of the picture is drawn while it changes.
//!
//! What a frame costs is known only when the next one begins: drivers in software do their work while the frame is presented. So
//! while the picture changes the next frame is asked for at once, and the time from one beginning to the next is the cost.
//! When frames take too long, edges are left out until the picture has been still for a moment. No count of panels decides:
//! what is slow here is fast on the next machine.

use std::{
    fmt::Write as _,
    fs::File,
    io::{BufWriter, Write as _},
    path::Path,
    sync::{Arc, Mutex, PoisonError},
    time::{Duration, Instant},
};

/// A frame that takes longer is felt: 30 a second.
const SLOW: Duration = Duration::from_millis(33);

/// So long after the last change the full picture is drawn again.
const STILL: Duration = Duration::from_millis(300);

/// So many frames in a row must have been slow: one may have been held up by something else.
const IN_A_ROW: u32 = 2;

/// How much is drawn.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Debug, Default)]
pub(super) enum Detail {
    /// Everything.
    #[default]
    Full,
    /// Of the edges only rims.
    Rims,
}

impl Detail {
    const fn lighter(self) -> Self {
        Self::Rims
    }
}

/// What is known about the frames so far.
#[derive(Debug, Default)]
pub(super) struct Frames {
    /// When this frame began.
    began: Option<Instant>,
    /// What the frame before this one drew and how long its own part took, if this frame was asked for at once after it.
    before: Option<(Detail, Duration)>,
    detail: Detail,
    /// The lightness that the last turning came to, and how many panels there were: the next one begins with it.
    learnt: (Detail, usize),
    slow_ones: u32,
    changed: Option<Instant>,
    log: Option<FrameLog>,
    /// Not in tests without a window: what they draw depends on no clock.
    watching: bool,
}

impl Frames {
    /// Frames whose times are looked at.
    pub(super) fn watched() -> Self {
        Self {
            watching: true,
            ..Self::default()
        }
    }

    /// Writes the time of every frame.
    pub(super) fn set_log(&mut self, log: Option<FrameLog>) {
        self.log = log;
    }

    /// How much is to be drawn now.
    pub(super) const fn detail(&self) -> Detail {
        self.detail
    }

    /// A frame begins. `panels` is how many there are to draw.
    pub(super) fn begin(&mut self, now: Instant, panels: usize) {
        if let (Some(began), Some((detail, own))) = (self.began, self.before.take()) {
            let took = now.saturating_duration_since(began);
            if let Some(log) = &self.log {
                log.write(took, own, detail, panels);
            }
            if SLOW < took && detail == self.detail {
                self.slow_ones += 1;
            } else {
                self.slow_ones = 0;
            }
            if IN_A_ROW <= self.slow_ones {
                self.slow_ones = 0;
                self.detail = self.detail.lighter();
                self.learnt = (self.detail, panels);
            }
        }
        self.began = Some(now);
    }

    /// A frame has been drawn. `changed` says whether its pictures are other ones than before, `held` whether a button is down.
    /// Gives how long to wait before the next frame, when one is needed.
    pub(super) fn end(&mut self, now: Instant, changed: bool, held: bool, panels: usize) -> Option<Duration> {
        if !self.watching {
            return None;
        }
        if changed && held {
            if self.changed.is_none() && self.learnt.1 == panels {
                self.detail = self.learnt.0;
            }
            self.changed = Some(now);
            let own = self
                .began
                .map_or(Duration::ZERO, |began| now.saturating_duration_since(began));
            self.before = Some((self.detail, own));
            return Some(Duration::ZERO);
        }
        let still = now.saturating_duration_since(self.changed?);
        if still < STILL {
            return Some(STILL - still);
        }
        self.changed = None;
        self.slow_ones = 0;
        if self.detail == Detail::Full {
            return None;
        }
        self.detail = Detail::Full;
        Some(Duration::ZERO)
    }
}

/// A file with one line a frame.
#[derive(Clone, Debug)]
pub(super) struct FrameLog(Arc<Mutex<BufWriter<File>>>);

impl FrameLog {
    /// Begins the file anew.
    ///
    /// # Errors
    /// One sentence, when it cannot be written.
    pub(super) fn create(path: &Path) -> Result<Self, String> {
        let unwritten = |cause| {
            format!(
                "cannot write {}: {cause}; give a file that may be written with --frame-times",
                path.display()
            )
        };
        let mut file = BufWriter::new(File::create(path).map_err(unwritten)?);
        writeln!(file, "frame_ms,own_ms,drawn,panels").map_err(unwritten)?;
        file.flush().map_err(unwritten)?;
        Ok(Self(Arc::new(Mutex::new(file))))
    }

    fn write(&self, took: Duration, own: Duration, detail: Detail, panels: usize) {
        let [took, own] = [took, own].map(|time| time.as_secs_f64() * 1e3);
        let drawn = match detail {
            Detail::Full => "full",
            Detail::Rims => "rims",
        };
        let mut line = String::new();
        let _ = write!(line, "{took:.3},{own:.3},{drawn},{panels}");
        // A full disk ends the measurement, not the work.
        let _ = writeln!(self.0.lock().unwrap_or_else(PoisonError::into_inner), "{line}");
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const PANELS: usize = 5000;

    /// Frames that change while a button is held, each so long; gives the time after them.
    fn turn(frames: &mut Frames, mut now: Instant, times: &[u64]) -> Instant {
        for &time in times {
            frames.begin(now, PANELS);
            assert_eq!(frames.end(now, true, true, PANELS), Some(Duration::ZERO));
            now += Duration::from_millis(time);
        }
        frames.begin(now, PANELS);
        now
    }

    #[test]
    fn quick_frames_stay_full_and_a_single_slow_one_changes_nothing() {
        let mut frames = Frames::watched();
        turn(&mut frames, Instant::now(), &[16, 20, 90, 20, 32, 90, 30]);
        assert_eq!(frames.detail(), Detail::Full);
    }

    #[test]
    fn slow_frames_are_lightened_and_filled_in_after_a_rest() {
        let mut frames = Frames::watched();
        let now = turn(&mut frames, Instant::now(), &[50, 50, 20, 20]);
        assert_eq!(frames.detail(), Detail::Rims);
        // Still: nothing is drawn anew until the rest is over, then once.
        let wait = frames.end(now, false, true, PANELS);
        assert!(wait.is_some_and(|w| Duration::ZERO < w && w <= STILL), "{wait:?}");
        assert_eq!(frames.detail(), Detail::Rims);
        let now = now + STILL;
        frames.begin(now, PANELS);
        assert_eq!(frames.end(now, false, false, PANELS), Some(Duration::ZERO));
        assert_eq!(frames.detail(), Detail::Full);
        frames.begin(now, PANELS);
        // The full picture comes, without a button held; then nothing more is asked for.
        assert_eq!(frames.end(now, true, false, PANELS), None);
        // The next turn of the same shell begins light; another shell begins full.
        let now = turn(&mut frames, now, &[20]);
        assert_eq!(frames.detail(), Detail::Rims);
        frames.end(now + STILL, false, false, PANELS);
        frames.begin(now + STILL, PANELS + 1);
        frames.end(now + STILL, true, true, PANELS + 1);
        assert_eq!(frames.detail(), Detail::Full);
    }

    #[test]
    fn the_time_between_two_unhurried_frames_is_no_cost() {
        let mut frames = Frames::watched();
        let mut now = Instant::now();
        for _ in 0..10 {
            frames.begin(now, PANELS);
            assert_eq!(frames.end(now, false, true, PANELS), None);
            now += Duration::from_millis(500);
        }
        assert_eq!(frames.detail(), Detail::Full);
    }
}
