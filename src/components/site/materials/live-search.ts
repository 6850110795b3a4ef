/**
 * Search as you type: the list page itself is fetched for the new words and its results are put in place, so that there is
 * one way to make them. Without scripts the form is sent as it stands.
 */
const PAUSE_MS = 160;

/** Ids of the parts that change: the kinds with their counts, what was found in a sentence (read out), and the list. */
const PARTS = ["kinds", "found", "results"] as const;

function start(form: HTMLFormElement, input: HTMLInputElement): void {
  let timer = 0;
  let running: AbortController | null = null;
  let shown = addressOf(form);

  async function update(): Promise<void> {
    const address = addressOf(form);
    if (address === shown) return;
    running?.abort();
    running = new AbortController();
    try {
      const response = await fetch(address, { signal: running.signal, headers: { accept: "text/html" } });
      if (!response.ok) return;
      const page = new DOMParser().parseFromString(await response.text(), "text/html");
      for (const id of PARTS) {
        document.getElementById(id)?.replaceChildren(...(page.getElementById(id)?.childNodes ?? []));
      }
      shown = address;
      history.replaceState(history.state, "", address);
    } catch (error) {
      // A newer search took over, or the line is down: the button still sends the form.
      if (!(error instanceof DOMException || error instanceof TypeError)) throw error;
    }
  }

  input.addEventListener("input", () => {
    window.clearTimeout(timer);
    timer = window.setTimeout(() => void update(), PAUSE_MS);
  });
}

function addressOf(form: HTMLFormElement): string {
  const query = new URLSearchParams();
  for (const [name, value] of new FormData(form)) {
    if (typeof value === "string" && value.trim() !== "") query.set(name, value.trim());
  }
  const words = query.toString();
  return words === "" ? form.action : `${form.action}?${words}`;
}

const form = document.querySelector<HTMLFormElement>(".find-material");
const input = form?.querySelector<HTMLInputElement>("input[name=query]");
if (form && input) start(form, input);
