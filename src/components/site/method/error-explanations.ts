/** What each error code means and what to do, one plain sentence each. The types see to it that no code is missing. */
import type { ProblemCode } from "#src/lib/http/problems.ts";
import type { FormulaErrorCode, MaterialErrorCode } from "#src/lib/physics/index.ts";

export interface Explanation {
  readonly means: string;
  readonly remedy: string;
}

export const PROBLEM_EXPLANATIONS: Record<ProblemCode, Explanation> = {
  malformed: {
    means: "The body or the address is not well formed, for example broken JSON.",
    remedy: "Correct the syntax at the place named and send it again.",
  },
  forbiddenKey: {
    means: "The body holds a key that is never accepted, such as __proto__.",
    remedy: "Take the key out.",
  },
  repeatedKey: { means: "One key of the address or the body is given twice.", remedy: "Keep one of the two." },
  badPath: {
    means: "The address holds doubled slashes, dots, backslashes or encodings that are not accepted.",
    remedy: "Write the address in its plain form.",
  },
  twoIdentities: {
    means: "A session cookie and an API key came with the same request.",
    remedy: "Send one of them: scripts the key, browsers the session.",
  },
  unauthenticated: {
    means: "No one is signed in, or the key is unknown, expired or revoked.",
    remedy: "Sign in, or send a valid key. Look-ups need neither.",
  },
  forbidden: {
    means: "The role or the key does not reach that far.",
    remedy: "Ask an owner of the team, or use a key with the scope needed.",
  },
  foreignOrigin: {
    means: "A page of another site tried to change something here.",
    remedy: "Use this site’s own pages, or a key from a script.",
  },
  notFound: {
    means: "Nothing stands at the address, or it belongs to a team you are not in.",
    remedy: "Check the spelling; the page names what comes closest.",
  },
  methodNotAllowed: {
    means: "The address exists, the method does not.",
    remedy: "Use one of those in the Allow header.",
  },
  notAcceptable: {
    means: "The Accept header asks for a form of answer that is not offered.",
    remedy: "Accept application/json, or leave the header out.",
  },
  requestTimeout: {
    means: "The request arrived too slowly and was given up.",
    remedy: "Send it again over a steadier connection.",
  },
  conflict: {
    means: "The change clashes with what is there, for example a name in use.",
    remedy: "Look at what is there, then change the request.",
  },
  gone: { means: "It was there once and was withdrawn.", remedy: "Ask who gave you the address for a new one." },
  revisionMismatch: {
    means: "Someone saved a newer revision since you read yours.",
    remedy: "Read the newer one, carry your change over, send it with its ETag.",
  },
  tooLarge: {
    means: "The body is above the limit named in the answer.",
    remedy: "Send less at once; batches may be split.",
  },
  addressTooLong: {
    means: "The address is longer than 8 KiB.",
    remedy: "Send the same question as a POST with a body.",
  },
  unsupportedMediaType: {
    means: "The Content-Type is not one that is read here.",
    remedy: "Send application/json.",
  },
  rangeNotSatisfiable: {
    means: "A part of a file was asked for that does not exist.",
    remedy: "Ask for the whole file.",
  },
  wrongHost: {
    means: "The request names a host that this server does not answer for.",
    remedy: "Use the site’s own address.",
  },
  invalid: {
    means: "The input can be read but is wrong. Each fault is listed with its place and a code of its own, below.",
    remedy: "Correct the fields named.",
  },
  revisionNeeded: {
    means: "A change was sent without saying which revision it is based on.",
    remedy: "Send the ETag you read in If-Match.",
  },
  tooManyRequests: {
    means: "More requests came from one place than are served.",
    remedy: "Wait as long as Retry-After says; many energies or materials fit into one request.",
  },
  headersTooLarge: { means: "The headers are too large.", remedy: "Clear this site’s cookies, or send fewer headers." },
  internal: {
    means: "Something failed on our side. Nothing of yours was changed.",
    remedy: "Try again. If it stays, tell the operator the request number.",
  },
  overloaded: {
    means: "The site has more to do than it can at the moment.",
    remedy: "Try again after the seconds that Retry-After names.",
  },
  notReady: { means: "The site is starting or stopping.", remedy: "Try again in some seconds." },
  storageFull: {
    means: "There is no room left to keep anything new.",
    remedy: "Nothing was kept. Tell the operator; look-ups still work.",
  },
};

export const FORMULA_EXPLANATIONS: Record<FormulaErrorCode, Explanation> = {
  empty: { means: "No formula was given.", remedy: "Write one, such as H2O or SiO2." },
  tooLong: {
    means: "The formula has more than 256 characters.",
    remedy: "Write long mixtures as parts with shares.",
  },
  tooDeep: { means: "Brackets stand more than 8 deep.", remedy: "Multiply some of them out." },
  unknownElement: {
    means: "A symbol is not that of an element from H to Cf.",
    remedy: "Take one of the symbols offered. Isotopes are written as their element.",
  },
  letterCase: {
    means: "A small letter stands where a symbol begins.",
    remedy: "Begin symbols with a capital: Co is cobalt, CO is carbon monoxide.",
  },
  foreignLetter: {
    means: "A letter of another alphabet stands in the formula; it can look like a Latin one.",
    remedy: "Type the Latin letter.",
  },
  invisibleCharacter: {
    means: "The text holds a character that cannot be seen, often from copying.",
    remedy: "Delete it, or type the formula again.",
  },
  unexpectedCharacter: {
    means: "A character is not part of a formula: a charge, a space, a sign.",
    remedy: "Use symbols, counts, ( ), [ ] and the dot before water.",
  },
  unclosedBracket: { means: "A bracket is opened and not closed.", remedy: "Close it." },
  unopenedBracket: { means: "A bracket is closed that was never opened.", remedy: "Remove it, or open it." },
  mismatchedBracket: { means: "A round bracket closes a square one, or the reverse.", remedy: "Use the same kind." },
  emptyGroup: { means: "A bracket or a part beside a dot holds no element.", remedy: "Fill it or remove it." },
  countZero: { means: "A count is zero.", remedy: "Leave the element out." },
  countTooLarge: {
    means: "A count is above 1 000 000, or all of them together are too large.",
    remedy: "Divide all counts by a common number.",
  },
  countTooSmall: { means: "A count is below 0.000001.", remedy: "Multiply all counts by a common number." },
  countMalformed: {
    means: "A number is not written as digits with at most one point between them.",
    remedy: "Write 0.5, not .5 or 5e-1.",
  },
  ambiguousHydrate: {
    means: "A point before water can be a decimal or the dot of a hydrate.",
    remedy: "Take one of the two spellings offered.",
  },
};

export const MATERIAL_EXPLANATIONS: Record<MaterialErrorCode, Explanation> = {
  noComponents: { means: "A mixture has no parts.", remedy: "Give at least one." },
  fractionNegative: { means: "A share is below 0.", remedy: "Shares are 0 or more." },
  fractionsAllZero: { means: "All shares are 0.", remedy: "Give each part its share." },
  fractionsDoNotSum: {
    means: "The shares differ from 1 by more than 0.001 in sum.",
    remedy: "Correct one of them; the sum found is named.",
  },
  densityMissing: {
    means: "A part needs a density, since shares are by volume or the whole is to be estimated.",
    remedy: "Give the part’s density, or that of the whole.",
  },
  densityOutOfRange: {
    means: "A density is not above 0 and at most 50 g/cm³.",
    remedy: "Check the unit: water is 1 g/cm³.",
  },
  molarMassMissing: {
    means: "A part counted by mole has no molar mass, since only its elements by mass are known.",
    remedy: "Count by mass or volume, or give its formula.",
  },
  concentrationTooHigh: {
    means: "The solutes leave no room for the solvent.",
    remedy: "Lower them, or give the density of the solution.",
  },
  solidFractionOutOfRange: {
    means: "The solid share is not above 0 and at most 1.",
    remedy: "Give the share of the volume that is solid.",
  },
  vacuumInMixture: { means: "Vacuum was given as a part.", remedy: "Use a solid share below 1 for pores." },
};
