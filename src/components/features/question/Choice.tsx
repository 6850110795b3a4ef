/** One of a few, each with a line on what it means. The chosen line carries a heavy foot and a tick. */
import { Fragment, type ReactNode } from "react";
import { Icon } from "#src/components/ui/Icon.tsx";

export interface ChoiceOption<T extends string> {
  readonly value: T;
  readonly label: string;
  readonly about: string;
  readonly drawing?: ReactNode;
}

interface Props<T extends string> {
  readonly label: string;
  readonly name: string;
  readonly options: readonly ChoiceOption<T>[];
  readonly value: string;
  readonly onChange: (value: T) => void;
  /** Side by side where there is room. */
  readonly inRow?: boolean;
  /** Stands under the chosen line. */
  readonly children?: ReactNode;
}

export function Choice<T extends string>(props: Props<T>) {
  return (
    <div className={props.inRow === true ? "choice choice-row" : "choice"} role="radiogroup" aria-label={props.label}>
      {props.options.map(({ value, label, about, drawing }) => (
        <Fragment key={value}>
          <label>
            <input
              type="radio"
              name={props.name}
              value={value}
              checked={props.value === value}
              onChange={() => props.onChange(value)}
            />
            <Icon name="tick" />
            <span>
              {drawing}
              <b>{label}</b>
              <small>{about}</small>
            </span>
          </label>
          {props.value === value && props.children ? <div className="choice-inside">{props.children}</div> : null}
        </Fragment>
      ))}
    </div>
  );
}
