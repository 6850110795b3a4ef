/** The Constants page's island: the same sections on the server and in the browser, from one view. */
import { AgreementSection, ListSection } from "./AgreementSection.tsx";
import { AnswerSection } from "./AnswerSection.tsx";
import { CompareSection } from "./CompareSection.tsx";
import { CurvesSection } from "./CurvesSection.tsx";
import { Queries } from "./Queries.tsx";
import { QuestionSection } from "./QuestionSection.tsx";
import { TableChoice } from "./TableChoice.tsx";
import { ThicknessSection } from "./ThicknessSection.tsx";
import { type LookupStart, useLookup } from "./useLookup.ts";

export default function ConstantsIsland({ start }: { start: LookupStart }) {
  return (
    <Queries>
      <Sections start={start} />
    </Queries>
  );
}

function Sections({ start }: { start: LookupStart }) {
  const lookup = useLookup(start);
  return (
    <>
      <QuestionSection lookup={lookup} />
      <AnswerSection view={lookup.view} question={lookup.question} stale={lookup.stale} />
      <CurvesSection lookup={lookup} />
      <ThicknessSection lookup={lookup} />
      <AgreementSection lookup={lookup} />
      <ListSection lookup={lookup} />
      <CompareSection lookup={lookup} />
      <TableChoice lookup={lookup} />
    </>
  );
}
