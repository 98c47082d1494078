"use strict";
// Hovering or choosing a mark lights its bar in every view and its rows.
(() => {
  const sheet = document.head.appendChild(document.createElement("style"));
  const chosen = document.getElementById("chosen");
  const words = chosen.querySelector("span");
  let pinned = "";
  let shown = null;

  const markOf = (node) => node.closest?.("[data-mark]")?.dataset.mark || "";

  const light = (mark) => {
    if (mark === shown) return;
    shown = mark;
    document.querySelectorAll("tr.lit").forEach((row) => row.classList.remove("lit"));
    if (!mark) { sheet.textContent = ""; return; }
    const at = `.sheet [data-mark="${CSS.escape(mark)}"]`;
    const shapes = ["path", "line", "polyline", "polygon", "circle"];
    const drawn = shapes.flatMap((s) => [`${at} ${s}`, at.replace(".sheet ", `.sheet ${s}`)]);
    const texts = [`${at} text`, at.replace(".sheet ", ".sheet text")];
    sheet.textContent =
      `${drawn.join(",")}{stroke:var(--lit)!important;filter:drop-shadow(0 0 .6px var(--lit))}` +
      `${at.replace(".sheet ", ".sheet circle")},${at} circle{fill:var(--lit)!important}` +
      `${texts.join(",")}{fill:var(--lit)!important;font-weight:700}`;
    document.querySelectorAll(`tr[data-mark="${CSS.escape(mark)}"]`)
      .forEach((row) => row.classList.add("lit"));
  };

  const choose = (mark) => {
    pinned = mark === pinned ? "" : mark;
    document.querySelectorAll("button.mark").forEach((button) =>
      button.setAttribute("aria-pressed", String(button.dataset.mark === pinned)));
    chosen.hidden = !pinned;
    if (pinned) {
      const row = document.querySelector(`tr[data-mark="${CSS.escape(pinned)}"]`);
      words.textContent = row ? row.dataset.say : `Mark ${pinned}`;
    }
    light(pinned);
  };

  document.addEventListener("pointerover", (event) => light(markOf(event.target) || pinned));
  document.addEventListener("focusin", (event) => light(markOf(event.target) || pinned));
  document.addEventListener("click", (event) => {
    const zoom = event.target.closest?.("[data-zoom]");
    if (zoom) {
      const view = zoom.closest("figure").querySelector(".sheet");
      const now = Number(view.style.getPropertyValue("--zoom")) || 1;
      const next = { in: now * 1.5, out: now / 1.5, fit: 1 }[zoom.dataset.zoom];
      view.style.setProperty("--zoom", Math.min(12, Math.max(1, next)));
      return;
    }
    const mark = markOf(event.target);
    if (mark) choose(mark);
  });
  document.addEventListener("keydown", (event) => {
    if (event.key === "Escape" && pinned) choose(pinned);
  });
  chosen.querySelector("button").addEventListener("click", () => choose(pinned));
})();
