import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes, TextareaHTMLAttributes } from "react";
import { useId } from "react";

interface FieldWords {
  label: ReactNode;
  hint?: ReactNode;
  /** As a form validator gives them; the first is shown. */
  errors?: string[];
  /** Shown after the control: a unit. */
  unit?: ReactNode;
}

export type InputFieldProps = FieldWords & InputHTMLAttributes<HTMLInputElement>;
export type TextareaFieldProps = FieldWords & TextareaHTMLAttributes<HTMLTextAreaElement>;
export type SelectFieldProps = FieldWords &
  SelectHTMLAttributes<HTMLSelectElement> & { options: { value: string; label: string }[] };
export type CheckboxFieldProps = Omit<FieldWords, "unit"> & InputHTMLAttributes<HTMLInputElement>;

/** A labelled text control. Spread `getInputProps(field, …)` into it and give `errors={field.errors}`. */
export function InputField({ label, hint, errors, unit, className, ...control }: InputFieldProps) {
  const id = useControlId(control.id);
  return (
    <FieldFrame id={id} {...{ label, hint, errors, unit, className }}>
      <input type="text" {...control} {...describe(id, hint, errors)} className="control" />
    </FieldFrame>
  );
}

export function TextareaField({ label, hint, errors, unit, className, ...control }: TextareaFieldProps) {
  const id = useControlId(control.id);
  return (
    <FieldFrame id={id} {...{ label, hint, errors, unit, className }}>
      <textarea rows={5} {...control} {...describe(id, hint, errors)} className="control" />
    </FieldFrame>
  );
}

export function SelectField({ label, hint, errors, unit, options, className, ...control }: SelectFieldProps) {
  const id = useControlId(control.id);
  return (
    <FieldFrame id={id} {...{ label, hint, errors, unit, className }}>
      <select {...control} {...describe(id, hint, errors)} className="control">
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}

/** One box to tick (or, with `type="radio"`, one choice of several). */
export function CheckboxField({ label, hint, errors, className = "", ...control }: CheckboxFieldProps) {
  const id = useControlId(control.id);
  return (
    <div className={`field field-check ${className}`}>
      <input type="checkbox" {...control} {...describe(id, hint, errors)} />
      <label htmlFor={id}>{label}</label>
      <FieldNotes id={id} hint={hint} errors={errors} />
    </div>
  );
}

/** A group of controls under one question. */
export function FieldGroup({ legend, children }: { legend: ReactNode; children: ReactNode }) {
  return (
    <fieldset className="field-group">
      <legend>{legend}</legend>
      {children}
    </fieldset>
  );
}

interface FrameProps extends FieldWords {
  id: string;
  className?: string;
  children: ReactNode;
}

function FieldFrame({ id, label, hint, errors, unit, className = "", children }: FrameProps) {
  return (
    <div className={`field ${className}`}>
      <label htmlFor={id}>{label}</label>
      {unit ? (
        <span className="control-with-unit">
          {children}
          <span className="soft">{unit}</span>
        </span>
      ) : (
        children
      )}
      <FieldNotes id={id} hint={hint} errors={errors} />
    </div>
  );
}

function FieldNotes({ id, hint, errors }: { id: string; hint?: ReactNode; errors?: string[] }) {
  return (
    <>
      {hint && (
        <p id={`${id}-description`} className="field-hint">
          {hint}
        </p>
      )}
      {errors?.[0] && (
        <p id={`${id}-error`} className="field-error">
          {errors[0]}
        </p>
      )}
    </>
  );
}

function useControlId(given: string | undefined): string {
  const made = useId();
  return given ?? made;
}

function describe(id: string, hint: ReactNode, errors: string[] | undefined) {
  const wrong = Boolean(errors?.[0]);
  const ids = [hint && `${id}-description`, wrong && `${id}-error`].filter(Boolean).join(" ");
  return { id, "aria-invalid": wrong || undefined, "aria-describedby": ids || undefined };
}
