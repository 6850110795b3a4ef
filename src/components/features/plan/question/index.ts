/** The plan page's question section. */
export { PlanPlainForm } from "./PlanPlainForm.tsx";
export { PlanQuestionSection } from "./PlanQuestionSection.tsx";
export { PlanSentence } from "./PlanSentence.tsx";
export type { PlanQuestionProps } from "./props.ts";
