/** A row of exclusive choices: native radio inputs, so that it works in a plain form as well as in an island. */
interface SegmentsProps {
  /** Read by screen readers as the group's name. */
  label: string;
  name: string;
  options: readonly { value: string; label: string }[];
  value: string;
  /** Left out in forms that are sent without scripts. */
  onChange?: ((value: string) => void) | undefined;
}

export function Segments({ label, name, options, value, onChange }: SegmentsProps) {
  return (
    <div className="seg" role="radiogroup" aria-label={label}>
      {options.map((option) => (
        <label key={option.value}>
          <input
            type="radio"
            name={name}
            value={option.value}
            {...(onChange === undefined
              ? { defaultChecked: option.value === value }
              : { checked: option.value === value, onChange: () => onChange(option.value) })}
          />
          <span>{option.label}</span>
        </label>
      ))}
    </div>
  );
}
