import { useId, type ComponentProps, type ReactNode } from "react";
import { classes } from "./classes.ts";
import "./field.css";

interface FieldWiring {
  readonly id: string;
  readonly "aria-describedby": string | undefined;
  readonly "aria-invalid": true | undefined;
}
interface FieldProps {
  readonly label: string;
  readonly hint?: ReactNode;
  /** What is wrong, as a sentence that says what to do. */
  readonly error?: string | null | undefined;
  readonly className?: string;
  readonly children: (wiring: FieldWiring) => ReactNode;
}

/** A label, the control it names, what helps to fill it in, and what is wrong with it. */
export function Field({ label, hint, error, className, children }: FieldProps) {
  const id = useId();
  const hintId = `${id}-hint`;
  const errorId = `${id}-error`;
  const described = [hint ? hintId : null, error ? errorId : null].filter(Boolean).join(" ");
  return (
    <div className={classes("flex flex-col gap-1", className)}>
      <label htmlFor={id} className="text-small font-medium text-ink-2">
        {label}
      </label>
      {children({ id, "aria-describedby": described || undefined, "aria-invalid": error ? true : undefined })}
      {hint && (
        <p id={hintId} className="text-small text-ink-2">
          {hint}
        </p>
      )}
      <FieldError id={errorId} error={error} />
    </div>
  );
}

/** In the page before there is an error, so that its coming is read aloud. */
function FieldError({ id, error }: { readonly id: string; readonly error: string | null | undefined }) {
  return (
    <p
      id={id}
      aria-live="polite"
      className={error ? "border-l-2 border-hairline pl-2 text-small text-hairline" : "sr-only"}
    >
      {error}
    </p>
  );
}

type TextFieldProps = Omit<FieldProps, "children"> &
  Omit<ComponentProps<"input">, "onChange" | "children"> & { readonly onValue: (value: string) => void };

export function TextField({ label, hint, error, className, onValue, ...input }: TextFieldProps) {
  return (
    <Field label={label} hint={hint} error={error} {...(className ? { className } : {})}>
      {(wiring) => (
        <input
          type="text"
          autoComplete="off"
          {...input}
          {...wiring}
          className="control"
          onChange={(event) => {
            onValue(event.target.value);
          }}
        />
      )}
    </Field>
  );
}

type SelectFieldProps<Value extends string> = Omit<FieldProps, "children"> & {
  readonly value: Value;
  readonly options: readonly (readonly [Value, string])[];
  readonly onValue: (value: Value) => void;
  readonly disabled?: boolean;
};

/** A native list of choices: known to every hand, screen reader and phone. */
export function SelectField<Value extends string>(props: SelectFieldProps<Value>) {
  const { label, hint, error, className, value, options, onValue, disabled } = props;
  return (
    <Field label={label} hint={hint} error={error} {...(className ? { className } : {})}>
      {(wiring) => (
        <select
          {...wiring}
          value={value}
          disabled={disabled}
          className="control"
          onChange={(event) => {
            const chosen = options.find(([known]) => known === event.target.value);
            if (chosen) onValue(chosen[0]);
          }}
        >
          {options.map(([known, name]) => (
            <option key={known} value={known}>
              {name}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

interface ChoiceProps {
  readonly type: "checkbox" | "radio";
  readonly label: string;
  readonly hint?: string;
  readonly checked: boolean;
  readonly name?: string;
  readonly onChecked: (checked: boolean) => void;
}

/** A box to tick or one of several to choose, with the words beside it as part of the target. */
export function Choice({ type, label, hint, checked, name, onChecked }: ChoiceProps) {
  const id = useId();
  return (
    <div className="flex items-start gap-2">
      <input
        id={id}
        type={type}
        name={name}
        checked={checked}
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="choice"
        onChange={(event) => {
          onChecked(event.target.checked);
        }}
      />
      <div className="flex flex-col">
        <label htmlFor={id} className="min-h-6 text-body">
          {label}
        </label>
        {hint && (
          <span id={`${id}-hint`} className="text-small text-ink-2">
            {hint}
          </span>
        )}
      </div>
    </div>
  );
}
