"""What the list of findings looks like, beside the picture or above it."""

from __future__ import annotations

__all__ = ["FINDINGS_STYLE"]

FINDINGS_STYLE = """
.plainodds-soundness .plainodds-summary p { font-size: 1.3em; line-height: 1.35; margin: 0; }
.plainodds-soundness .plainodds-settings { display: flex; flex-direction: column; gap: 12px; }
.plainodds-soundness .plainodds-findings { display: flex; flex-direction: column; gap: 2px; }
.plainodds-soundness .plainodds-finding {
  position: relative; padding: 6px 8px 7px; gap: 1px; flex: none;
  border-left: 5px solid transparent; border-bottom: 1px solid var(--plainodds-rule);
}
.plainodds-soundness .plainodds-finding:hover { background: var(--plainodds-raised); }
.plainodds-soundness .plainodds-chosen {
  border-left-color: var(--plainodds-focus); background: var(--plainodds-raised);
}
.plainodds-view .plainodds-finding > .jupyter-button.jupyter-button {
  position: static; height: auto; padding: 0; border: none; background: none; box-shadow: none;
  white-space: normal; text-align: left; line-height: 1.35; font-weight: 400;
  overflow-wrap: anywhere; width: 100%;
}
.plainodds-view .plainodds-weighs > .jupyter-button.jupyter-button,
.plainodds-view .plainodds-chosen > .jupyter-button.jupyter-button { font-weight: 600; }
.plainodds-view .plainodds-finding > .jupyter-button.jupyter-button:focus {
  outline: none !important; box-shadow: none;
}
.plainodds-view .plainodds-finding:has(> .jupyter-button:focus-visible) {
  outline: 2px solid var(--plainodds-focus); outline-offset: -2px;
}
/* the whole card is the button */
.plainodds-view .plainodds-finding > .jupyter-button::after {
  content: ""; position: absolute; inset: 0; z-index: 1;
}
.plainodds-soundness .plainodds-found {
  color: var(--plainodds-faint); font-size: 0.92em; line-height: 1.35;
}
.plainodds-soundness :is(.plainodds-weighs, .plainodds-chosen) .plainodds-found { color: inherit; }
.plainodds-soundness .plainodds-found span {
  display: -webkit-box; -webkit-box-orient: vertical; -webkit-line-clamp: 2; overflow: hidden;
  overflow-wrap: anywhere;
}
.plainodds-soundness .plainodds-weighs .plainodds-found span { -webkit-line-clamp: 4; }
.plainodds-soundness .plainodds-stage .widget-dropdown {
  display: flex; flex-flow: row wrap; align-items: center; gap: 3px 10px;
  width: auto; max-width: 100%; height: auto; align-self: flex-start;
}
.plainodds-soundness .plainodds-stage .widget-dropdown > .widget-label {
  flex: none; width: auto; height: auto; margin: 0; line-height: 1.3; font-weight: 600;
  color: var(--plainodds-ink); text-align: left; overflow: visible;
}
.plainodds-soundness .plainodds-stage .widget-dropdown > select { flex: 0 1 260px; }
.plainodds-soundness :is(.plainodds-ahead, .plainodds-beside):empty { display: none; }
.plainodds-soundness .plainodds-beside:has(> .plainodds-work:empty) { display: none; }
.plainodds-soundness .plainodds-begin { align-self: flex-start; }
.plainodds-soundness .plainodds-work { position: static; align-self: flex-start; }
.plainodds-soundness .plainodds-table th[scope="row"] { min-width: 9em; }
.plainodds-view summary { cursor: pointer; font-weight: 600; padding: 3px 0; }
.plainodds-view summary:focus-visible {
  outline: 2px solid var(--plainodds-focus); outline-offset: 2px;
}
.plainodds-view details > :nth-child(2) { margin-top: 6px; }

@container (min-width: 720px) {
  .plainodds-soundness .plainodds-body {
    grid-template-columns: minmax(240px, 300px) minmax(0, 1fr);
    grid-template-rows: auto auto 1fr;
  }
  .plainodds-soundness .plainodds-summary { grid-area: 1 / 1 / auto / span 2; }
  .plainodds-soundness .plainodds-controls { grid-area: 2 / 1 / span 2; }
  .plainodds-soundness .plainodds-stage { grid-area: 2 / 2; }
  .plainodds-soundness .plainodds-rest { grid-area: 3 / 2; }
}
@container (max-width: 719.98px) {
  /* the picture comes right after the list, what is seldom changed after the picture */
  .plainodds-soundness .plainodds-controls { display: contents; }
  .plainodds-soundness .plainodds-stage { order: 1; }
  .plainodds-soundness .plainodds-settings { order: 3; }
  .plainodds-soundness .plainodds-rest { order: 2; }
  .plainodds-soundness .plainodds-findings {
    max-height: 320px; overflow-y: auto; border: 1px solid var(--plainodds-rule);
  }
}
"""
