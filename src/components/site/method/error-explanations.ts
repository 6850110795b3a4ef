/** What each error code means and what to do, one plain sentence each. The types see to it that no code is missing. */
import type { ProblemCode } from "#src/lib/http/problems.ts";
import type { FormulaErrorCode, MaterialErrorCode } from "#src/lib/physics/index.ts";
import type { QuantityErrorCode } from "#src/lib/quantities/index.ts";

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

/** Codes that more than one kind of field uses. */
type SharedCode = "empty" | "tooLong";

export const FORMULA_EXPLANATIONS: Record<Exclude<FormulaErrorCode, SharedCode>, Explanation> = {
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

/** Codes of materials that only a request, not the core, can meet. */
type StatementCode = "nestedTooDeep" | "materialNotFound" | "partRepeated";

export const MATERIAL_EXPLANATIONS: Record<MaterialErrorCode | StatementCode, Explanation> = {
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
  nestedTooDeep: {
    means: "Mixtures stand more than 5 deep inside each other.",
    remedy: "Write the inner part as a formula or by its elements.",
  },
  materialNotFound: {
    means: "No material has that id.",
    remedy: "Look it up by name: the list of materials gives the id.",
  },
  partRepeated: { means: "A part stands twice in one mixture.", remedy: "Add its shares up into one part." },
};

/** Codes of single fields of a request that the schema, not a reader of quantities, finds. */
type FieldCode =
  | "unknownKey"
  | "missing"
  | "wrongType"
  | "tooSmall"
  | "tooLarge"
  | "notAChoice"
  | "wrongFormat"
  | "invalid"
  | "oneOf"
  | "repeatedKey"
  | "badCursor"
  | "brokenText"
  | "unsafeInteger"
  | "tooFewPoints"
  | "tooManyRows"
  | "outsideTable";

export const QUANTITY_EXPLANATIONS: Record<
  Exclude<QuantityErrorCode, "invisibleCharacter"> | "outsideTable" | "tooFewPoints",
  Explanation
> = {
  empty: { means: "The field holds nothing.", remedy: "Write a value, such as 20 keV or H2O." },
  tooLong: {
    means: "The text or list is longer than the limit named; a formula has at most 256 characters.",
    remedy: "Shorten it. Long mixtures are written as parts with shares.",
  },
  decimalComma: {
    means: "A comma stands where a decimal point is meant.",
    remedy: "Write 0.98, with a point. A comma separates two values.",
  },
  notANumber: { means: "The text is not a number.", remedy: "Write digits with at most one decimal point." },
  foreignDigits: { means: "Digits of another script are not read.", remedy: "Write the digits 0 to 9." },
  notFinite: { means: "The number is too large to be held.", remedy: "Check the power of ten." },
  underflow: { means: "The number is so small that it would become 0.", remedy: "Check the power of ten." },
  unknownUnit: {
    means: "The unit is not one that is read here.",
    remedy: "Use one of those the message names, or none: the field’s own unit is then taken.",
  },
  wrongDimension: {
    means: "The unit measures something else, for example a length where a density is asked for.",
    remedy: "Use a unit of the kind named.",
  },
  notPositive: { means: "The value must be above 0.", remedy: "Leave signs out, or correct the value." },
  outOfRange: {
    means: "The value lies outside what is accepted or covered.",
    remedy: "Stay within the bounds named.",
  },
  outsideTable: {
    means: "The energy lies outside the chosen table.",
    remedy: "Stay within the bounds named, or choose a table that reaches further.",
  },
  rangeReversed: { means: "A range ends at or below its start.", remedy: "Write the smaller value first." },
  stepNotPositive: { means: "The step of a range is not above 0.", remedy: "Write a step above 0." },
  tooFewPoints: { means: "A range with two ends has a count below 2.", remedy: "Give a count of at least 2." },
  tooMany: { means: "More values than the limit named.", remedy: "Take fewer, or a coarser range." },
};

export const FIELD_EXPLANATIONS: Record<Exclude<FieldCode, keyof typeof QUANTITY_EXPLANATIONS>, Explanation> = {
  missing: { means: "A field that is needed is not there.", remedy: "Add it." },
  unknownKey: {
    means: "A key is not one that is read here, often a spelling mistake.",
    remedy: "Correct or remove it. Nothing is ignored in silence.",
  },
  repeatedKey: { means: "A key stands twice.", remedy: "Keep one." },
  wrongType: {
    means: "The value is of another kind than asked for, for example text where a number stands.",
    remedy: "Send numbers as JSON numbers, without quotes.",
  },
  tooSmall: { means: "A number or a list is below the least accepted.", remedy: "Stay at or above the bound named." },
  tooLarge: { means: "A number is above the greatest accepted.", remedy: "Stay at or below the bound named." },
  notAChoice: { means: "The value is not one of the choices.", remedy: "Take one of those the message lists." },
  wrongFormat: { means: "The text does not have the form asked for.", remedy: "Follow the form the message gives." },
  oneOf: {
    means: "Two ways to name the material are given, or none.",
    remedy: "Give formula with densityGCm3, or materialId.",
  },
  brokenText: { means: "The text holds half of a character.", remedy: "Send whole UTF-8." },
  unsafeInteger: {
    means: "A whole number has more digits than can be held exactly.",
    remedy: "Send fewer digits.",
  },
  badCursor: {
    means: "The cursor is not one that this list gave out.",
    remedy: "Send nextCursor of the answer before, or leave it out.",
  },
  tooManyRows: {
    means: "The items of a batch ask for more energies together than the limit named.",
    remedy: "Send several batches.",
  },
  invalid: { means: "The value is not accepted for the reason named.", remedy: "Follow the message." },
};

/** Every code that `errors[].code` of a problem document can carry, whatever kind of field it stands for. */
/** Faults of a stated plan. */
export const PLAN_EXPLANATIONS: Readonly<Record<string, Explanation>> = {
  featureTooLarge: {
    means: "The feature is longer along the beam than its host is thick.",
    remedy: "Make the feature smaller or the host thicker.",
  },
  sourceInsideSample: {
    means: "The source would stand inside the sample or a layer before it.",
    remedy: "Give at least half the host and the layers before it as the source distance.",
  },
  fluxMissing: {
    means: "The plan is to be ranked by time, but the flux is not known.",
    remedy: "Give the flux, or rank by dose or fluence.",
  },
  planeTooLarge: {
    means: "Energies times distances are more points than one request ranks.",
    remedy: "Take fewer energies or distances: at most 20,000 points together.",
  },
  notInTable: {
    means: "The tabulation has no values of one of the materials at this energy.",
    remedy: "Take another energy or another tabulation.",
  },
  setupNotFound: {
    means: "No setup has this id.",
    remedy: "Take one of /api/v1/setups/examples, or state the setup's figures.",
  },
  useNotOffered: {
    means: "That use of the images is not ranked yet.",
    remedy: "Ask for absorption, direct, retrieval or tomography.",
  },
  notForThisShape: {
    means: "A measure was given that the shape does not have.",
    remedy: "Leave it out: spheres have a diameter only, fibres no width.",
  },
  energiesNotRising: {
    means: "The rows of a flux curve do not rise in energy.",
    remedy: "Sort the rows by energy, each energy once.",
  },
  logOfZero: {
    means: "A range that begins at 0 cannot have even steps in the logarithm.",
    remedy: "Take linear spacing, or begin above 0.",
  },
};

export const FAULT_EXPLANATIONS: Readonly<Record<string, Explanation>> = {
  ...PLAN_EXPLANATIONS,
  ...FIELD_EXPLANATIONS,
  ...QUANTITY_EXPLANATIONS,
  ...FORMULA_EXPLANATIONS,
  ...MATERIAL_EXPLANATIONS,
};
