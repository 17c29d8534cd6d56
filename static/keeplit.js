// Extras only: every page works without this file.
(() => {
  // A second tap on a button that is being sent does nothing; the button stays readable.
  document.addEventListener("submit", (event) => {
    const form = event.target;
    if (form.dataset.sent) { event.preventDefault(); return; }
    form.dataset.sent = "yes";
    window.setTimeout(() => { delete form.dataset.sent; }, 8000);
  });
  window.addEventListener("pageshow", () => {
    for (const form of document.forms) delete form.dataset.sent;
  });

  // The box of faults is read first.
  const trouble = document.getElementById("trouble");
  if (trouble) trouble.focus();

  // On a phone the steps are one line: the one that is open is brought into it.
  const step = document.querySelector(".steps [aria-current]");
  if (step) step.closest("ol").scrollLeft = step.offsetLeft - 16;

  // What is typed beside a choice picks it.
  for (const box of document.querySelectorAll("input[data-picks]")) {
    box.addEventListener("input", () => { document.getElementById(box.dataset.picks).checked = true; });
  }

  // − and + beside every count.
  for (const box of document.querySelectorAll("input[data-count]")) {
    const step = (by, words) => {
      const button = document.createElement("button");
      button.type = "button";
      button.className = "step";
      button.textContent = by < 0 ? "−" : "+";
      button.setAttribute("aria-label", `${words} ${box.dataset.count}`);
      button.addEventListener("click", () => {
        const now = Number.parseInt(box.value, 10) || 0;
        const next = Math.max(0, now + by);
        box.value = next === 0 ? "" : String(next);
        box.dispatchEvent(new Event("input", { bubbles: true }));
      });
      return button;
    };
    box.before(step(-1, "One less:"));
    box.after(step(1, "One more:"));
  }
})();
