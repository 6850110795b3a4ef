/**
 * A menu button after the ARIA pattern: `<menu-button>` around a button and an element with role="menu".
 * ↓ and Enter open at the first or chosen item, ↑ at the last; ↑ ↓ Home End move; a letter jumps; Esc and Tab close.
 */
class MenuButton extends HTMLElement {
  connectedCallback(): void {
    this.button.addEventListener("click", () => (this.isOpen ? this.close() : this.open("chosen")));
    this.button.addEventListener("keydown", (event) => {
      if (event.key === "ArrowDown") this.open("chosen");
      else if (event.key === "ArrowUp") this.open("last");
      else return;
      event.preventDefault();
    });
    this.menu.addEventListener("keydown", (event) => this.move(event));
    this.menu.addEventListener("click", (event) => {
      if ((event.target as Element).closest("[role^=menuitem]") !== null) this.close();
    });
    this.addEventListener("focusout", (event) => {
      if (!this.contains(event.relatedTarget as Node | null)) this.close(false);
    });
    document.addEventListener("pointerdown", (event) => {
      if (this.isOpen && !this.contains(event.target as Node)) this.close(false);
    });
  }

  private get button(): HTMLButtonElement {
    return this.querySelector<HTMLButtonElement>("button[aria-haspopup]")!;
  }

  private get menu(): HTMLElement {
    return this.querySelector<HTMLElement>("[role=menu]")!;
  }

  private get items(): HTMLElement[] {
    return [...this.menu.querySelectorAll<HTMLElement>("[role^=menuitem]")];
  }

  private get isOpen(): boolean {
    return !this.menu.hidden;
  }

  private open(at: "chosen" | "last"): void {
    this.menu.hidden = false;
    this.button.setAttribute("aria-expanded", "true");
    const chosen = this.items.find((item) => item.getAttribute("aria-checked") === "true");
    (at === "last" ? this.items.at(-1) : (chosen ?? this.items[0]))?.focus();
  }

  private close(returnFocus = true): void {
    if (!this.isOpen) return;
    this.menu.hidden = true;
    this.button.setAttribute("aria-expanded", "false");
    if (returnFocus) this.button.focus();
  }

  private move(event: KeyboardEvent): void {
    const items = this.items;
    const here = items.indexOf(document.activeElement as HTMLElement);
    const last = items.length - 1;
    if (event.key === "Escape") this.close();
    else if (event.key === "Tab") return this.close(false);
    else if (event.key === "ArrowDown") items[here === last ? 0 : here + 1]?.focus();
    else if (event.key === "ArrowUp") items[here <= 0 ? last : here - 1]?.focus();
    else if (event.key === "Home") items[0]?.focus();
    else if (event.key === "End") items[last]?.focus();
    else if (event.key.length === 1 && /\S/.test(event.key) && !event.ctrlKey && !event.metaKey && !event.altKey) {
      if (event.key === " ") return;
      const letter = event.key.toLowerCase();
      const round = [...items.slice(here + 1), ...items.slice(0, here + 1)];
      round.find((item) => item.textContent.trim().toLowerCase().startsWith(letter))?.focus();
    } else return;
    event.preventDefault();
  }
}

if (customElements.get("menu-button") === undefined) customElements.define("menu-button", MenuButton);
