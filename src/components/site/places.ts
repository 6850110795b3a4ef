/** The places of the site, in the order of the header. Only places that exist stand here. */
export const PLACES = [
  { key: "plan", name: "Plan", href: "/plan" },
  { key: "constants", name: "Constants", href: "/constants" },
  { key: "materials", name: "Materials", href: "/materials" },
  { key: "method", name: "Method", href: "/method" },
] as const;

export type PlaceKey = (typeof PLACES)[number]["key"];
