/** The editor of a blank; some serve two. */
import { DistancesEditor } from "./DistancesEditor.tsx";
import { EnergiesEditor } from "./EnergiesEditor.tsx";
import { HostEditor } from "./HostEditor.tsx";
import { LimitsEditor } from "./LimitsEditor.tsx";
import { PairMaterialEditor } from "./PairMaterialEditor.tsx";
import type { EditorProps } from "./props.ts";
import { SetupEditor } from "./SetupEditor.tsx";
import { ShapeEditor } from "./ShapeEditor.tsx";
import { UseEditor } from "./UseEditor.tsx";

export function OpenEditor(props: EditorProps) {
  switch (props.field) {
    case "size":
    case "shape":
      return <ShapeEditor {...props} />;
    case "feature":
    case "host":
      return <PairMaterialEditor {...props} field={props.field} />;
    case "thickness":
    case "layers":
      return <HostEditor {...props} />;
    case "setup":
      return <SetupEditor {...props} />;
    case "energies":
      return <EnergiesEditor {...props} />;
    case "distances":
      return <DistancesEditor {...props} />;
    case "use":
      return <UseEditor {...props} />;
    case "dose":
    case "time":
      return <LimitsEditor {...props} />;
  }
}
