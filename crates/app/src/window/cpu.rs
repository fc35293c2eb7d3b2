//! The window that the processor draws: for machines without OpenGL, or whose OpenGL runs on the
//! processor anyway. It opens quicker and needs less memory than that.
//!
//! A frame is drawn only when there is news: an event, an answer of the solver, or a time that was
//! asked for.

use std::sync::{Mutex, PoisonError};
use std::time::{Duration, Instant};

use egui::{Context, RequestRepaintInfo, ViewportBuilder, ViewportId};
use egui_winit::accesskit_winit;
use winit::application::ApplicationHandler;
use winit::event::{StartCause, WindowEvent};
use winit::event_loop::{ActiveEventLoop, ControlFlow, EventLoop, EventLoopProxy};
use winit::window::WindowId;

use super::cpu_running::Running;
use super::{MakeApp, reason};
use crate::error::AppError;

/// What wakes the loop from outside.
#[derive(Debug)]
pub(super) enum Wake {
    /// The app wants a frame at that time, asked for in that pass.
    Repaint { when: Instant, pass: u64 },
    /// A screen reader.
    AccessKit(accesskit_winit::Event),
}

impl From<accesskit_winit::Event> for Wake {
    fn from(event: accesskit_winit::Event) -> Self {
        Self::AccessKit(event)
    }
}

/// Opens the window and stays until it is closed.
pub(crate) fn run(viewport: ViewportBuilder, make: MakeApp) -> Result<(), AppError> {
    let outcome = reason::caught(|| {
        let event_loop = EventLoop::<Wake>::with_user_event()
            .build()
            .map_err(|error| reason::of_text(error.to_string()))?;
        let mut cpu = CpuWindow::new(event_loop.create_proxy(), viewport, make);
        let looped = event_loop.run_app(&mut cpu);
        match (cpu.failure, looped) {
            (Some(failure), _) => Err(failure),
            (None, Err(error)) => Err(reason::of_text(error.to_string())),
            (None, Ok(())) => Ok(()),
        }
    });
    outcome?
}

/// When to draw next.
#[derive(Debug, Default, Clone, Copy, PartialEq, Eq)]
struct Schedule {
    next: Option<Instant>,
}

impl Schedule {
    /// A frame is wanted at `when`; an earlier one stays.
    fn want(&mut self, when: Instant) {
        self.next = Some(self.next.map_or(when, |next| next.min(when)));
    }

    /// Whether it is time; then nothing is wanted any more.
    fn is_due(&mut self, now: Instant) -> bool {
        let due = self.next.is_some_and(|next| next <= now);
        if due {
            self.next = None;
        }
        due
    }

    fn flow(self) -> ControlFlow {
        self.next.map_or(ControlFlow::Wait, ControlFlow::WaitUntil)
    }
}

struct CpuWindow {
    context: Context,
    proxy: EventLoopProxy<Wake>,
    viewport: ViewportBuilder,
    make: Option<MakeApp>,
    running: Option<Running>,
    schedule: Schedule,
    failure: Option<AppError>,
}

impl CpuWindow {
    fn new(proxy: EventLoopProxy<Wake>, viewport: ViewportBuilder, make: MakeApp) -> Self {
        let context = Context::default();
        let sender = Mutex::new(proxy.clone());
        context.set_request_repaint_callback(move |info: RequestRepaintInfo| {
            // A time too far off to be told is never.
            let Some(when) = Instant::now().checked_add(info.delay) else {
                return;
            };
            let pass = info.current_cumulative_pass_nr;
            let sender = sender.lock().unwrap_or_else(PoisonError::into_inner);
            // The loop is gone when the window is: nobody is left to draw.
            let _ = sender.send_event(Wake::Repaint { when, pass });
        });
        Self {
            context,
            proxy,
            viewport,
            make: Some(make),
            running: None,
            schedule: Schedule::default(),
            failure: None,
        }
    }

    fn end(&mut self, event_loop: &ActiveEventLoop, failure: Option<AppError>) {
        self.failure = failure;
        if let Some(mut running) = self.running.take() {
            running.app.closed();
        }
        event_loop.exit();
    }

    fn draw(&mut self, event_loop: &ActiveEventLoop) {
        let Some(running) = &mut self.running else {
            return;
        };
        match running.draw(event_loop) {
            Ok(false) => {}
            Ok(true) => self.end(event_loop, None),
            Err(error) => self.end(event_loop, Some(error)),
        }
    }
}

impl ApplicationHandler<Wake> for CpuWindow {
    fn resumed(&mut self, event_loop: &ActiveEventLoop) {
        let Some(make) = self.make.take() else {
            return;
        };
        let viewport = self.viewport.clone();
        match Running::open(event_loop, &self.context, viewport, &self.proxy, make) {
            Ok(running) => {
                self.running = Some(running);
                self.draw(event_loop);
            }
            Err(error) => self.end(event_loop, Some(error)),
        }
    }

    fn new_events(&mut self, _: &ActiveEventLoop, _: StartCause) {
        if self.schedule.is_due(Instant::now())
            && let Some(running) = &self.running
        {
            running.window.request_redraw();
        }
    }

    fn user_event(&mut self, _: &ActiveEventLoop, wake: Wake) {
        match wake {
            Wake::Repaint { when, pass } => {
                let now = self.context.cumulative_pass_nr_for(ViewportId::ROOT);
                // A wish of a pass before the last has been met already.
                if now == pass || now == pass + 1 {
                    self.schedule.want(when);
                }
            }
            Wake::AccessKit(event) => {
                if let Some(running) = &mut self.running {
                    running.accesskit(event.window_event);
                }
            }
        }
    }

    fn window_event(&mut self, event_loop: &ActiveEventLoop, _: WindowId, event: WindowEvent) {
        if matches!(event, WindowEvent::RedrawRequested) {
            self.draw(event_loop);
        } else if let Some(running) = &mut self.running {
            running.hear(&event);
        }
    }

    fn about_to_wait(&mut self, event_loop: &ActiveEventLoop) {
        if self
            .schedule
            .is_due(Instant::now() + Duration::from_micros(100))
            && let Some(running) = &self.running
        {
            running.window.request_redraw();
        }
        event_loop.set_control_flow(self.schedule.flow());
    }

    fn exiting(&mut self, _: &ActiveEventLoop) {
        if let Some(mut running) = self.running.take() {
            running.app.closed();
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_earliest_wish_counts_and_is_met_once() {
        let now = Instant::now();
        let later = now + Duration::from_secs(5);
        let mut schedule = Schedule::default();
        assert_eq!(schedule.flow(), ControlFlow::Wait, "no news, no frame");
        schedule.want(later);
        schedule.want(now);
        schedule.want(later);
        assert_eq!(schedule.flow(), ControlFlow::WaitUntil(now), "the earliest");
        assert!(schedule.is_due(now), "it is time");
        assert!(!schedule.is_due(later), "once");
        assert_eq!(schedule.flow(), ControlFlow::Wait, "and then no more");
    }
}
