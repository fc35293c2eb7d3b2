//! One open window: events in, frames out.

use std::sync::Arc;

use egui::{
    Context, Event, ViewportBuilder, ViewportCommand, ViewportEvent, ViewportId, ViewportInfo,
};
use egui_winit::accesskit_winit::WindowEvent as AccessKitEvent;
use egui_winit::{ActionRequested, State};
use helmsplit_raster::Canvas;
use winit::event::WindowEvent;
use winit::event_loop::{ActiveEventLoop, EventLoopProxy};
use winit::window::Window;

use super::cpu::Wake;
use super::present::Screen;
use super::size::within_screens;
use super::{MakeApp, reason};
use crate::app::HelmsplitApp;
use crate::error::AppError;

/// Largest side of a texture, px; the processor has no limit of its own.
const TEXTURE_SIDE: usize = 8192;

pub(super) struct Running {
    pub(super) window: Arc<Window>,
    pub(super) app: HelmsplitApp,
    context: Context,
    screen: Screen,
    state: State,
    canvas: Canvas,
    info: ViewportInfo,
    /// Hidden until the first frame is there, so that nothing flashes.
    visible: bool,
}

impl Running {
    /// Opens the window, hidden.
    pub(super) fn open(
        event_loop: &ActiveEventLoop,
        context: &Context,
        viewport: ViewportBuilder,
        proxy: &EventLoopProxy<Wake>,
        make: MakeApp,
    ) -> Result<Self, AppError> {
        let text = |error: &dyn std::fmt::Display| reason::of_text(error.to_string());
        let viewport = within_screens(viewport, context.zoom_factor(), event_loop);
        let window = egui_winit::create_window(context, event_loop, &viewport.with_visible(false))
            .map_err(|error| text(&error))?;
        let window = Arc::new(window);
        let mut state = State::new(
            context.clone(),
            ViewportId::ROOT,
            event_loop,
            Some(window.scale_factor() as f32),
            window.theme(),
            Some(TEXTURE_SIDE),
        );
        state.init_accesskit(event_loop, &window, proxy.clone());
        let screen = Screen::new(event_loop, Arc::clone(&window)).map_err(|error| text(&error))?;
        let mut info = ViewportInfo::default();
        egui_winit::update_viewport_info(&mut info, context, &window, true);
        Ok(Self {
            app: make(context)?,
            window,
            context: context.clone(),
            screen,
            state,
            canvas: Canvas::new(),
            info,
            visible: false,
        })
    }

    /// Takes an event of the window; a frame follows if it can change anything.
    pub(super) fn hear(&mut self, event: &WindowEvent) {
        if matches!(event, WindowEvent::CloseRequested) {
            self.info.events.push(ViewportEvent::Close);
        }
        if self.state.on_window_event(&self.window, event).repaint {
            self.window.request_redraw();
        }
    }

    /// Takes a wish of a screen reader.
    pub(super) fn accesskit(&mut self, event: AccessKitEvent) {
        match event {
            AccessKitEvent::InitialTreeRequested => self.context.enable_accesskit(),
            AccessKitEvent::ActionRequested(request) => {
                self.state.on_accesskit_action_request(request);
            }
            AccessKitEvent::AccessibilityDeactivated => self.context.disable_accesskit(),
        }
        self.window.request_redraw();
    }

    /// Draws a frame; `true` if the window is to close.
    pub(super) fn draw(&mut self, event_loop: &ActiveEventLoop) -> Result<bool, AppError> {
        egui_winit::update_viewport_info(&mut self.info, &self.context, &self.window, false);
        let mut input = self.state.take_egui_input(&self.window);
        input.viewports.insert(ViewportId::ROOT, self.info.clone());
        let closing = self.info.close_requested();
        let app = &mut self.app;
        let output = self.context.run_ui(input, |ui| app.show(ui));
        self.info.events.clear();
        self.state.handle_platform_output_with_event_loop(
            &self.window,
            event_loop,
            output.platform_output,
        );
        let mut textures = output.textures_delta;
        self.canvas.take_textures(&mut textures)?;
        let meshes = self
            .context
            .tessellate(output.shapes, output.pixels_per_point);
        self.paint(&meshes, output.pixels_per_point)?;
        let mut viewports = output.viewport_output;
        let commands = viewports
            .remove(&ViewportId::ROOT)
            .map_or_else(Vec::new, |viewport| viewport.commands);
        let stays = commands.contains(&ViewportCommand::CancelClose);
        self.obey(commands);
        Ok(closing && !stays)
    }

    fn paint(&mut self, meshes: &[egui::ClippedPrimitive], scale: f32) -> Result<(), AppError> {
        let size = self.window.inner_size();
        // Wide enough on every platform that has windows.
        let size = [size.width as usize, size.height as usize];
        // A window that is put away has no pixels on some systems.
        if size[0] > 0 && size[1] > 0 {
            let ground = self.context.global_style().visuals.panel_fill;
            let areas = self.canvas.show(meshes, size, scale, ground)?;
            self.window.pre_present_notify();
            self.screen
                .present(self.canvas.picture(), &areas)
                .map_err(|error| AppError::Screen {
                    cause: error.to_string(),
                })?;
        }
        if !self.visible {
            self.visible = true;
            self.window.set_visible(true);
            reason::shown();
        }
        Ok(())
    }

    fn obey(&mut self, commands: Vec<ViewportCommand>) {
        let mut actions = Vec::new();
        egui_winit::process_viewport_commands(
            &self.context,
            &mut self.info,
            commands,
            &self.window,
            &mut actions,
        );
        for action in actions {
            let event = match action {
                ActionRequested::Cut => Event::Cut,
                ActionRequested::Copy => Event::Copy,
                ActionRequested::Paste => match self.state.clipboard_text() {
                    Some(text) => Event::Paste(text.replace("\r\n", "\n")),
                    None => continue,
                },
                // The app takes no pictures of its window: it has a painter of its own for that.
                ActionRequested::Screenshot(_) | ActionRequested::PaintWhileHidden => continue,
            };
            self.state.egui_input_mut().events.push(event);
            self.window.request_redraw();
        }
    }
}
