/** Files of the plan page: what they hold is what the API answers. */
import Papa from "papaparse";
import { describe, expect, inject, it } from "vitest";
import type { RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import { good, post } from "#tests/support/api.ts";
import { expectProblem } from "#tests/support/problems.ts";

const QUERY =
  "?feature=hydroxyapatite&shape=sphere&size=10%20um&host=water&use=retrieval&energies=12%20to%2040%20keV%20in%2015%20steps&distances=3%20mm%20to%200.3%20m%20in%2010%20steps&dose=5%20Gy";

async function file(path: string): Promise<{ text: string; response: Response }> {
  const response = await fetch(`${inject("baseUrl")}/plan/${path}`);
  return { text: await response.text(), response };
}
async function saved(): Promise<{ request: object; answer: RankAnswer }> {
  const { text, response } = await file(`answer.json${QUERY}`);
  expect(response.headers.get("content-disposition")).toBe('attachment; filename="rimelight-plan.json"');
  return JSON.parse(text) as { request: object; answer: RankAnswer };
}
/** Comment lines, then the table. */
const read = (text: string): { comments: string[]; rows: Record<string, string>[] } => {
  const lines = text.split("\r\n");
  return {
    comments: lines.filter((line) => line.startsWith("#")),
    rows: Papa.parse<Record<string, string>>(lines.filter((line) => !line.startsWith("#")).join("\n"), {
      header: true,
      skipEmptyLines: true,
    }).data,
  };
};

describe("files of a plan", () => {
  it("JSON holds a request that the API answers alike", async () => {
    const { request, answer } = await saved();
    const again = good<RankAnswer>(await post("/plans/rank", request));
    expect(again).toEqual(answer);
  });

  it("the list's CSV holds every pick at full precision, with verdict and citation above", async () => {
    const { answer } = await saved();
    const { text, response } = await file(`picks.csv${QUERY}`);
    expect(response.headers.get("content-type")).toBe("text/csv; charset=utf-8");
    const { comments, rows } = read(text);
    expect(comments).toEqual([`# ${answer.verdict.summary}`, `# ${answer.citation}`]);
    const picks = [...answer.candidates, answer.absorptionBest!];
    expect(rows).toHaveLength(picks.length);
    for (const [index, pick] of picks.entries()) {
      expect(Number(rows[index]!["energyKeV"])).toBe(pick.energyKeV);
      expect(Number(rows[index]!["entranceDoseGy"])).toBe(pick.entranceDoseGy);
      expect(rows[index]!["warnings"]).toBe(pick.warnings.map(({ code }) => code).join(" "));
    }
    expect(rows.at(-1)!["role"]).toBe("absorption's best");
  });

  it("the plane's CSV holds every point and what forbids it", async () => {
    const { answer } = await saved();
    const { rows } = read((await file(`plane.csv${QUERY}`)).text);
    const { plane } = answer;
    expect(rows).toHaveLength(plane.energiesKeV.length * plane.distancesM.length);
    for (const [place, row] of rows.entries()) {
      const [i, j] = [Math.floor(place / plane.distancesM.length), place % plane.distancesM.length];
      expect(Number(row["energyKeV"])).toBe(plane.energiesKeV[i]);
      expect(Number(row["objective"])).toBe(plane.objective[i]![j]);
      expect(row["forbiddenBy"]).toBe(plane.forbiddenBy[i]![j] ?? "");
      expect(row["allowed"]).toBe(plane.allowed[i]![j] ? "1" : "0");
    }
  });

  it.each(["answer.json", "picks.csv", "plane.csv"])(
    "%s of a question that cannot be read is a problem naming the field",
    async (name) => {
      const { text, response } = await file(`${name}?size=2,5%20um`);
      const problem = expectProblem(
        { status: response.status, contentType: response.headers.get("content-type") ?? undefined, body: text },
        "invalid",
      );
      expect(problem.errors?.[0]).toMatchObject({ path: "/size" });
    },
  );
});
