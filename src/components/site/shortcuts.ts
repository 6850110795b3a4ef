/**
 * Single keys that work while no field has focus: `/` goes to what is marked data-shortcut="/" or to the first blank,
 * `?` to the list of keys; a letter or digit presses what is marked with it. They can be switched off on the method page (WCAG 2.1.4); the choice stays in this browser.
 */
const STORAGE_KEY = "rimelight-shortcuts";
const KEY_LIST = "/method#keyboard";

function shortcutsOn(): boolean {
  try {
    return localStorage.getItem(STORAGE_KEY) !== "off";
  } catch {
    return true;
  }
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable || target.matches("input, textarea, select") || target.closest("[role=dialog]") !== null)
  );
}

document.addEventListener("keydown", (event) => {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
  if (!shortcutsOn()) return;
  if (event.key === "/") {
    const goal = document.querySelector<HTMLElement>('[data-shortcut="/"], main .slot, main .slot-field');
    if (goal === null) return;
    event.preventDefault();
    goal.focus();
  } else if (event.key === "?") {
    location.assign(KEY_LIST);
  } else if (/^[a-z1-9]$/.test(event.key)) {
    document.querySelector<HTMLElement>(`main [data-shortcut="${event.key}"]`)?.click();
  }
});

for (const box of document.querySelectorAll<HTMLInputElement>("[data-shortcuts]")) {
  box.checked = shortcutsOn();
  box.addEventListener("change", () => {
    try {
      localStorage.setItem(STORAGE_KEY, box.checked ? "on" : "off");
    } catch {
      // Storage is closed in this browser: the keys stay as they were.
      box.checked = shortcutsOn();
    }
  });
}
