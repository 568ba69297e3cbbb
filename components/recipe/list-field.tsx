import { TextArea } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import type { ParsedList } from "./parse-list";

interface ListFieldProps {
  label: string;
  value: string;
  placeholder: string;
  rows: number;
  onChange: (text: string) => void;
  parsed: ParsedList<number>;
  /** What the values were understood to be. */
  understood: string;
  problems: readonly string[] | undefined;
}

/** A typed or pasted list, with what was understood under it. */
export function ListField(props: ListFieldProps) {
  const { label, value, placeholder, rows, onChange, parsed, understood, problems = [] } = props;
  const again = parsed.repeated > 0 ? `; ${parsed.repeated} stood there twice and count once` : "";
  return (
    <Field label={label} hint={`Understood: ${understood}${again}.`} error={problems.join(" ") || null}>
      <TextArea
        mono
        className="field-sizing-content"
        style={{ minHeight: `${rows * 1.375 + 0.875}rem` }}
        value={value}
        placeholder={placeholder}
        spellCheck={false}
        onChange={(event) => onChange(event.target.value)}
      />
    </Field>
  );
}
