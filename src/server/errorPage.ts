/** The front's own errors for people. Plain and small: it must not need anything that could have failed. */
import { createHash } from "node:crypto";
import type { ProblemDocument } from "#src/lib/http/problems.ts";

const STYLE =
  "html{color-scheme:light dark}body{font:1.125rem/1.5 system-ui,sans-serif;max-width:36rem;margin:12vh auto;padding:0 1.25rem}code{overflow-wrap:anywhere}";
const STYLE_HASH = createHash("sha256").update(STYLE).digest("base64");

export const ERROR_PAGE_POLICY = `default-src 'none'; style-src 'sha256-${STYLE_HASH}'; object-src 'none'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'`;

export function errorPage(problem: ProblemDocument): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(problem.title)} · Rimelight</title>
<style>${STYLE}</style>
</head>
<body>
<h1>${escape(problem.title)}</h1>
<p>${escape(problem.detail)}</p>
<p><a href="/">Start page</a></p>
<p><small>Error ${problem.status}. If you report it, name the request <code>${escape(problem.requestId)}</code>.</small></p>
</body>
</html>
`;
}

function escape(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}
