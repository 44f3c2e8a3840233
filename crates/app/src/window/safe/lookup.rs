//! A question to the disk that the window does not wait for: a folder on a network may take its time.

use std::{sync::mpsc, thread};

/// A question that may be on its way.
#[derive(Debug)]
pub(super) struct Lookup<T> {
    answer: Option<mpsc::Receiver<T>>,
}

impl<T> Default for Lookup<T> {
    fn default() -> Self {
        Self { answer: None }
    }
}

impl<T: Send + 'static> Lookup<T> {
    /// Asks, unless the answer to an earlier question is still awaited. Without a context, the question is answered at once.
    pub(super) fn begin(&mut self, ctx: Option<&egui::Context>, ask: impl FnOnce() -> T + Send + 'static) {
        if self.answer.is_some() {
            return;
        }
        let (send, answer) = mpsc::channel();
        self.answer = Some(answer);
        let Some(ctx) = ctx.cloned() else {
            let _ = send.send(ask());
            return;
        };
        let asking = thread::Builder::new().name("zonewright-look".to_owned());
        // Without a thread, the question stays unanswered: the channel closes.
        let _ = asking.spawn(move || {
            let _ = send.send(ask());
            ctx.request_repaint();
        });
    }

    /// The answer, once.
    pub(super) fn poll(&mut self) -> Option<T> {
        match self.answer.as_ref()?.try_recv() {
            Ok(answer) => {
                self.answer = None;
                Some(answer)
            }
            Err(mpsc::TryRecvError::Empty) => None,
            Err(mpsc::TryRecvError::Disconnected) => {
                self.answer = None;
                None
            }
        }
    }
}
