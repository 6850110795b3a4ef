/** The strict reader: what JSON.parse would take in silence is told, in time linear in the text. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { MAX_DEPTH, readStrictJson } from "#src/lib/http/json.ts";
import { MAX_FAULTS, ProblemError } from "#src/lib/http/problems.ts";

function problemOf(text: string): ProblemError {
  try {
    readStrictJson(text);
  } catch (error) {
    if (error instanceof ProblemError) return error;
    throw error;
  }
  throw new Error(`${text.slice(0, 60)} was accepted.`);
}

describe("readStrictJson", () => {
  it("gives what JSON.parse gives, for any JSON value without forbidden keys", () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 6 }), (value) => {
        const text = JSON.stringify(value);
        if (/"(__proto__|constructor|prototype)"|\\u00|[\x7f]|\\[bf]/.test(text)) return;
        if (/\de\+?\d|\d{16}|\\ud/i.test(text)) return;
        expect(readStrictJson(text)).toEqual(JSON.parse(text));
      }),
      { numRuns: 500, seed: 7 },
    );
  });

  it("throws a problem and nothing else, for any text", () => {
    const pieces = fc.constantFrom(...'{}[],:"\\-+.0123456789eE \n\tau', '"a"', "null", "1e400", "\\u0041", "\\ud800");
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ unit: "binary" }),
          fc.array(pieces, { maxLength: 60 }).map((list) => list.join("")),
        ),
        (text) => {
          try {
            readStrictJson(text);
          } catch (error) {
            expect(error).toBeInstanceOf(ProblemError);
          }
        },
      ),
      { numRuns: 3000, seed: 7 },
    );
  });

  it.each([
    "",
    " ",
    "not json",
    "{",
    '{"a":1,}',
    "[1 2]",
    "{'a':1}",
    '{"a":01}',
    '{"a":.5}',
    "[1,",
    "-",
    '"\\x"',
    "1.2.3",
    '{"a"}',
  ])("refuses %j as malformed", (text) => {
    expect(problemOf(text).code).toBe("malformed");
  });

  it.each(['{"__proto__":1}', '{"a":{"constructor":1}}', '[{"prototype":1}]', '{"\\u005f_proto__":1}'])(
    "refuses the key in %s, but not the word as a value",
    (text) => {
      expect(problemOf(text).code).toBe("forbiddenKey");
      expect(readStrictJson('{"a":"__proto__"}')).toEqual({ a: "__proto__" });
    },
  );

  it("tells equal keys of one object, however they are written, and lets different objects have the same", () => {
    for (const text of ['{"a":1,"a":2}', '{"a":1,"\\u0061":2}', '[{"b":{"a":[{}]},"b":2}]', '{"":1,"":2}'])
      expect(problemOf(text).code, text).toBe("repeatedKey");
    expect(readStrictJson('[{"a":1},{"a":{"a":["a","a"]}}]')).toEqual([{ a: 1 }, { a: { a: ["a", "a"] } }]);
  });

  it("takes nesting as deep as the limit and no deeper", () => {
    const nested = (depth: number): string => "[".repeat(depth) + "]".repeat(depth);
    expect(readStrictJson(nested(MAX_DEPTH))).toBeInstanceOf(Array);
    expect(problemOf(nested(MAX_DEPTH + 1)).message).toContain(String(MAX_DEPTH));
  });

  it.each([
    ["1e400", "notFinite"],
    ["-1e400", "notFinite"],
    ["1e-400", "underflow"],
    ["-0.1e-400", "underflow"],
    ["9007199254740993", "unsafeInteger"],
  ])("refuses the number %s as %s at its place", (number, code) => {
    const problem = problemOf(`{"x":{"a/b~c":[0, ${number}]}}`);
    expect(problem.code).toBe("invalid");
    expect(problem.errors).toEqual([
      { path: "/x/a~1b~0c/1", code, message: expect.stringContaining(number) as string },
    ]);
  });

  it.each(["0", "-0", "0e9", "0.0e-500", "1e308", "5e-324", "9007199254740991", "1e20"])(
    "reads the number %s",
    (number) => {
      expect(readStrictJson(`[${number}]`)).toEqual([Number(number)]);
    },
  );

  it("tells control characters as malformed, line breaks and tabs aside, and half characters as invalid", () => {
    for (const text of ['["a\\u0000b"]', '["a\\u0008"]', '["\\u007f"]', '{"a\\u0000":1}'])
      expect(problemOf(text).code, text).toBe("malformed");
    expect(readStrictJson('["a\\n\\tb"]')).toEqual(["a\n\tb"]);
    for (const text of ['["\\ud800"]', '["a\\udc00b"]', '{"\\ud800":1}'])
      expect(problemOf(text).errors?.[0]?.code, text).toBe("brokenText");
    expect(readStrictJson('["\\ud83d\\ude00"]')).toEqual(["😀"]);
  });

  it("lists a bounded number of faults and echoes a bounded part of the text", () => {
    expect(problemOf(`[${"1e400,".repeat(30_000)}0]`).errors).toHaveLength(MAX_FAULTS);
    const long = problemOf(`{"${"k".repeat(200_000)}":1e400}`).errors?.[0];
    expect(long?.path.length).toBeLessThan(70);
    expect(problemOf(`{"${"k".repeat(200_000)}":1,"${"k".repeat(200_000)}":1}`).message.length).toBeLessThan(150);
  });

  // Each of these took seconds, or the whole process, with a reader that searches or goes back.
  it.each([
    ["an unclosed text of escapes", `"${'\\"'.repeat(131_000)}`],
    ["quotes", '"'.repeat(262_000)],
    ["brackets", "[".repeat(262_000)],
    ["numbers below a long key", `{"${"k".repeat(130_000)}":[${"0,".repeat(65_000)}0]}`],
    ["digits", `[${"9".repeat(262_000)}]`],
    ["minus signs", "-".repeat(262_000)],
    ["words", "a ".repeat(131_000)],
    ["numbers that are too large", `[${"1e400,".repeat(43_000)}0]`],
  ])("answers within a second on 256 KiB of %s", (_, text) => {
    const start = performance.now();
    try {
      readStrictJson(text);
    } catch (error) {
      expect(error).toBeInstanceOf(ProblemError);
    }
    expect(performance.now() - start).toBeLessThan(1000);
  });
});
