"""What views look like: one style sheet, in the notebook's own colours and letters.

JupyterLab's variables carry the theme; beside each stands what is used where there is
no JupyterLab. Pictures have dark ink on no paper: on a dark page a filter turns their
lightness round and leaves the hues where they are.
"""

from __future__ import annotations

__all__ = ["KEYS", "STYLE"]

# JupyterLab takes plain keys for its cells from everything but boxes of text: arrows would leave
# a drop-down, and two letters would delete the cell. The attribute is its own way to forbid that;
# shortcuts with Ctrl or Cmd remain. Where scripts are not carried out, nothing else changes.
KEYS = (
    "window.plainoddsKeys ??= (window.addEventListener('keydown', event =>"
    " event.target.closest?.('.plainodds-view') && event.target.toggleAttribute("
    "'data-lm-suppress-shortcuts', !event.ctrlKey && !event.metaKey), true), true)"
)
"""Lets controls have their keys; a script for the style sheet's `onload`."""

STYLE = """
.plainodds-view {
  --plainodds-ink: var(--jp-ui-font-color1, #1f2933);
  --plainodds-faint: var(--jp-ui-font-color2, #52606d);
  --plainodds-rule: var(--jp-border-color2, #c3ccd4);
  --plainodds-paper: var(--jp-layout-color1, #ffffff);
  --plainodds-raised: var(--jp-layout-color2, #eef1f4);
  --plainodds-focus: var(--jp-brand-color1, #1668b8);
  --plainodds-size: var(--jp-ui-font-size1, 13px);
  container-type: inline-size;
  width: 100%;
  max-width: 1120px;
  box-sizing: border-box;
  color: var(--plainodds-ink);
  font-family: var(--jp-ui-font-family, system-ui, sans-serif);
  font-size: var(--plainodds-size);
  line-height: 1.45;
}
.plainodds-view.plainodds-view .jupyter-widgets { margin: 0; min-width: 0; max-width: 100%; }
.plainodds-view .widget-box { overflow: visible; }
.plainodds-view .widget-html, .plainodds-view .widget-html-content {
  height: auto; line-height: inherit; width: 100%; white-space: normal;
}
.plainodds-view .plainodds-style { display: none; }

.plainodds-view .plainodds-body {
  display: grid;
  grid-template-columns: minmax(0, 1fr);
  gap: 14px 24px;
  align-items: start;
}
.plainodds-view .plainodds-rest { display: flex; flex-direction: column; gap: 14px; }
.plainodds-view .plainodds-controls { display: flex; flex-direction: column; gap: 12px; }
@container (min-width: 720px) {
  .plainodds-view .plainodds-body {
    grid-template-columns: 240px minmax(0, 1fr);
    grid-template-rows: auto 1fr;
  }
  .plainodds-view .plainodds-stage { grid-area: 1 / 2; }
  .plainodds-view .plainodds-controls { grid-area: 1 / 1 / span 2; }
  .plainodds-view .plainodds-rest { grid-area: 2 / 2; }
  .plainodds-view .plainodds-letters:not(.plainodds-on) { display: none; }
  /* the picture's own border ends where the text begins */
  .plainodds-view .plainodds-picture img { margin-left: -8px; }
}

.plainodds-view .plainodds-picture img { display: block; }
.plainodds-view :is(.plainodds-stage, .plainodds-shown) {
  display: flex; flex-direction: column; gap: 8px;
}
.plainodds-view .plainodds-letters { align-self: flex-start; }

/* switches stand in a line above the picture that they turn */
.plainodds-view .plainodds-switches { display: flex; flex-flow: row wrap; gap: 4px 28px; }
.plainodds-view .plainodds-either {
  width: auto; height: auto; display: flex; flex-flow: row wrap; align-items: center;
  gap: 2px 12px;
}
.plainodds-view .plainodds-either > .widget-label {
  width: auto; height: auto; margin: 0; text-align: left; line-height: 1.3; font-weight: 600;
  color: var(--plainodds-ink);
}
.plainodds-view .plainodds-either .widget-radio-box {
  display: flex; flex-flow: row wrap; gap: 2px 12px; width: auto; height: auto;
  margin: 0 !important;
}
.plainodds-view .plainodds-either .widget-radio-box label {
  display: flex; flex-direction: row-reverse; justify-content: flex-end; align-items: center;
  gap: 5px; width: auto; height: auto; margin: 0; padding: 2px 0; line-height: 1.3;
  min-height: 24px; box-sizing: border-box;
}
.plainodds-view .plainodds-either input[type="radio"] {
  margin: 0; width: 15px; height: 15px; flex: none; accent-color: var(--plainodds-focus);
}
body[data-jp-theme-light="false"] .plainodds-picture img,
body.vscode-dark .plainodds-picture img { filter: invert(1) hue-rotate(180deg); }

/* work that is over at once is not told of; while it goes on the last picture steps back */
@keyframes plainodds-appear { from { visibility: hidden; opacity: 0; } }
@keyframes plainodds-step-back { to { opacity: 0.4; } }
.plainodds-view .plainodds-stage { position: relative; }
.plainodds-view .plainodds-work:empty { display: none; }
.plainodds-view .plainodds-work {
  position: absolute; top: 0; right: 0; z-index: 1; max-width: 100%; box-sizing: border-box;
  display: flex; flex-flow: row wrap; align-items: center; gap: 6px 12px; padding: 7px 12px;
  background: var(--plainodds-paper); border: 1px solid var(--plainodds-rule);
  border-left: 5px solid var(--plainodds-focus);
  animation: plainodds-appear 1ms 300ms backwards;
}
.plainodds-view .plainodds-work-said { width: auto; }
.plainodds-view .plainodds-work-said .widget-html-content {
  display: flex; flex-flow: row wrap; align-items: center; gap: 4px 12px;
  font-variant-numeric: tabular-nums;
}
.plainodds-view progress { width: 120px; accent-color: var(--plainodds-focus); }
.plainodds-view .plainodds-stage:has(.plainodds-work-said) .plainodds-picture {
  animation: plainodds-step-back 1ms 300ms forwards;
}

.plainodds-view .plainodds-controls .widget-inline-hbox,
.plainodds-view .plainodds-controls .widget-checkbox {
  width: 100%; height: auto; flex-wrap: wrap; align-items: center; gap: 3px 8px;
}
.plainodds-view .plainodds-controls .widget-label {
  width: auto; margin: 0; text-align: left; white-space: normal; overflow: visible;
  line-height: 1.3; font-weight: 600; color: var(--plainodds-ink); height: auto;
}
.plainodds-view .widget-dropdown > .widget-label { flex: 1 0 100%; }
.plainodds-view .widget-dropdown > select {
  flex: 1 1 0; width: 100%; height: 28px; border-radius: 2px; text-overflow: ellipsis;
  padding-right: 26px; color: var(--plainodds-ink); background-color: var(--plainodds-paper);
  background-image: linear-gradient(45deg, transparent 50%, currentColor 50%),
    linear-gradient(135deg, currentColor 50%, transparent 50%);
  background-size: 5px 5px; background-repeat: no-repeat;
  background-position: right 14px center, right 9px center;
}
.plainodds-view .plainodds-text > .widget-label { flex: 1 0 100%; }
.plainodds-view .widget-text > input[type="text"] { flex: 1 1 0; height: 28px; }
.plainodds-view .plainodds-controls .widget-text > .widget-label:not([style*="none"]) {
  flex: 1 1 90px;
}
.plainodds-view .widget-text > input[type="number"] {
  flex: 0 0 84px; height: 28px; border-radius: 2px; font-variant-numeric: tabular-nums;
}
.plainodds-view .plainodds-controls .widget-hslider { height: 24px; }
.plainodds-view .widget-hslider .slider-container { flex: 1 1 0; margin: 0 8px; }
.plainodds-view .widget-checkbox .widget-label-basic {
  display: flex; align-items: baseline; gap: 7px; width: auto; white-space: normal;
  line-height: 1.3; font-weight: 600; overflow: visible;
}
.plainodds-view .widget-checkbox input[type="checkbox"] {
  margin: 0; flex: none; width: 15px; height: 15px; align-self: flex-start;
  accent-color: var(--plainodds-focus);
}
.plainodds-view .plainodds-block { display: flex; flex-direction: column; gap: 5px; }
.plainodds-view .plainodds-place:empty { display: none; }
.plainodds-view .plainodds-place { display: flex; flex-direction: column; gap: 12px; }
.plainodds-view .plainodds-ticks { display: flex; flex-flow: row wrap; gap: 5px 14px; }
.plainodds-view .plainodds-ticks .widget-checkbox { width: auto; }
.plainodds-view .plainodds-ticks .widget-checkbox .widget-label-basic { font-weight: 400; }
.plainodds-view .plainodds-span { display: flex; flex-direction: column; gap: 5px; }
.plainodds-view :is(.plainodds-place, .plainodds-extras) > .jupyter-button {
  align-self: flex-start;
}
.plainodds-view .plainodds-title { font-weight: 600; line-height: 1.3; }
.plainodds-view .plainodds-set {
  display: flex; flex-direction: column; gap: 12px;
  border-left: 2px solid var(--plainodds-rule); padding-left: 12px;
}
.plainodds-view .plainodds-buttons {
  display: flex; flex-flow: row wrap; gap: 8px; align-items: center;
}
.plainodds-view .jupyter-button {
  width: auto; height: 28px; line-height: 26px; padding: 0 8px; border-radius: 2px;
  border: 1px solid var(--jp-border-color1, #9aa5b1); background: var(--plainodds-paper);
  color: var(--plainodds-ink); box-shadow: none;
}
.plainodds-view .jupyter-button:hover:enabled { background: var(--plainodds-raised); }
.plainodds-view .plainodds-buttons .widget-dropdown { width: auto; height: 28px; }
.plainodds-view .plainodds-buttons .widget-dropdown > .widget-label {
  flex: none; width: auto; margin: 0 6px 0 0; text-align: left; overflow: visible;
}
.plainodds-view .plainodds-buttons .widget-dropdown > select { flex: 0 0 76px; }

.plainodds-view :is(input, select, button, pre, a, .noUi-handle):focus-visible {
  outline: 2px solid var(--plainodds-focus) !important; outline-offset: 2px;
}
.plainodds-view input:invalid { box-shadow: none; }

.plainodds-view p { margin: 0 0 0.6em; max-width: 68ch; }
.plainodds-view h4 { margin: 0 0 0.3em; font-size: inherit; font-weight: 600; }
.plainodds-view ul { margin: 0 0 0.6em; padding-left: 1.3em; max-width: 68ch; }
.plainodds-view li { margin: 0 0 0.25em; }
.plainodds-view .plainodds-lead { font-size: 1.15em; line-height: 1.4; }
.plainodds-view .plainodds-cautions {
  border-left: 2px solid var(--plainodds-rule); padding-left: 12px;
}
.plainodds-view .plainodds-note { color: var(--plainodds-faint); font-size: 0.92em; }

.plainodds-view .plainodds-problem-text, .plainodds-view .plainodds-remark-text,
.plainodds-view .plainodds-warning-text {
  border: 1px solid var(--plainodds-rule); border-left-width: 5px; padding: 7px 12px;
  margin-bottom: 10px; overflow-wrap: anywhere;
}
.plainodds-view .plainodds-problem-text {
  border-color: var(--jp-error-color1, #b3261e);
}
.plainodds-view .plainodds-warning-text {
  border-color: var(--jp-warn-color0, #9a5b00); margin: 8px 0 0;
}

.plainodds-view table {
  border-collapse: collapse; width: auto; max-width: 100%; margin: 0; font-size: inherit;
  border: none; color: inherit;
}
.plainodds-view caption {
  caption-side: top; text-align: left; font-weight: 600; padding: 0 0 6px;
  color: var(--plainodds-ink);
}
.plainodds-view :is(th, td) {
  text-align: left; vertical-align: top; padding: 3px 14px 3px 0; font-weight: 400;
  border: none; overflow-wrap: break-word; background: none;
}
.plainodds-view thead th {
  color: var(--plainodds-faint); vertical-align: bottom; line-height: 1.25;
  border-bottom: 1px solid var(--plainodds-rule);
}
.plainodds-view tbody tr { background: none !important; }
.plainodds-view .plainodds-number, .plainodds-view .plainodds-number-head { text-align: right; }
.plainodds-view .plainodds-number { font-variant-numeric: tabular-nums; }
.plainodds-view td > span { white-space: nowrap; }
.plainodds-view .plainodds-unmoved :is(th, td) { color: var(--plainodds-faint); }
.plainodds-view .plainodds-within > th { padding-left: 14px; }
.plainodds-view .plainodds-group th { font-weight: 600; padding-top: 9px; }
.plainodds-view .plainodds-total :is(th, td) {
  border-top: 1px solid var(--plainodds-rule); font-weight: 600;
}
.plainodds-view tr > :last-child { padding-right: 0; }
@container (max-width: 480px) {
  .plainodds-view progress { width: 56px; }
  .plainodds-view :is(th, td) { padding-right: 9px; font-size: 0.94em; }
  .plainodds-view .plainodds-within > th { padding-left: 7px; }
  .plainodds-view .plainodds-joint :is(th, td) { padding-right: 6px; font-size: 0.88em; }
  .plainodds-view .plainodds-joint tr > :last-child { padding-right: 0; }
  .plainodds-view .plainodds-joint .plainodds-within > th { padding-left: 0; }
  .plainodds-view td > span:not(:only-child),
  .plainodds-view td:not(.plainodds-number) > span { white-space: normal; }
}
.plainodds-view .plainodds-stacked .plainodds-number > span { display: block; }
.plainodds-view .plainodds-part table { min-width: min(100%, 440px); }
.plainodds-view .plainodds-part + .plainodds-part, .plainodds-view table + table,
.plainodds-view .plainodds-note + table { margin-top: 14px; }
.plainodds-view .plainodds-joint :is(th, td):first-child { padding-right: 10px; }
.plainodds-view .plainodds-table .widget-html-content { overflow-x: auto; }
.plainodds-view .plainodds-extras { display: flex; flex-direction: column; gap: 6px; }

.plainodds-view pre {
  margin: 0; padding: 9px 12px; user-select: all;
  white-space: pre-wrap; word-break: normal; overflow-wrap: anywhere;
  background: var(--plainodds-raised); color: inherit; font-size: 0.95em;
  font-family: var(--jp-code-font-family, monospace); line-height: 1.4;
}
.plainodds-view a { color: var(--jp-content-link-color, #1668b8); text-decoration: underline; }
"""
