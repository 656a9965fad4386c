import { Field, Input, NativeSelect, Textarea } from '@chakra-ui/react';
import type { InputProps, NativeSelectFieldProps, TextareaProps } from '@chakra-ui/react';
import { useId } from 'react';
import type { ReactNode, Ref } from 'react';

interface FieldWords {
  readonly label: ReactNode;
  /** What may be typed here, under the label. */
  readonly hint?: ReactNode;
  /** A sentence; shown under the field and read with it. */
  readonly error?: string | undefined;
  /** Reads the label aloud without showing it, where the place says what the field is. */
  readonly hideLabel?: boolean;
}

/** Label, hint, the control, error; tied together for screen readers by Chakra's Field. */
function Around({
  label,
  hint,
  error,
  hideLabel,
  id,
  children,
}: FieldWords & { id: string; children: ReactNode }) {
  return (
    <Field.Root invalid={Boolean(error)} ids={{ control: id }}>
      <Field.Label className={hideLabel ? 'visually-hidden' : undefined}>{label}</Field.Label>
      {hint ? <Field.HelperText>{hint}</Field.HelperText> : null}
      {children}
      <Field.ErrorText role="alert">{error}</Field.ErrorText>
    </Field.Root>
  );
}

export type TextFieldProps = FieldWords & InputProps & { readonly ref?: Ref<HTMLInputElement> };

/** One line. Takes everything an input takes, so `{...register('title')}` spreads into it. */
export function TextField({ label, hint, error, hideLabel, id, ...input }: TextFieldProps) {
  const own = useId();
  return (
    <Around {...{ label, hint, error, hideLabel }} id={id ?? own}>
      <Input {...input} />
    </Around>
  );
}

export type TextAreaFieldProps = FieldWords & TextareaProps & { readonly ref?: Ref<HTMLTextAreaElement> };

export function TextAreaField({ label, hint, error, hideLabel, id, ...area }: TextAreaFieldProps) {
  const own = useId();
  return (
    <Around {...{ label, hint, error, hideLabel }} id={id ?? own}>
      <Textarea rows={4} {...area} />
    </Around>
  );
}

export type SelectFieldProps = FieldWords &
  NativeSelectFieldProps & { readonly ref?: Ref<HTMLSelectElement> };

/** The browser's own list (it knows every phone); `children` are its options. */
export function SelectField({ label, hint, error, hideLabel, id, children, ...select }: SelectFieldProps) {
  const own = useId();
  return (
    <Around {...{ label, hint, error, hideLabel }} id={id ?? own}>
      <NativeSelect.Root>
        <NativeSelect.Field {...select}>{children}</NativeSelect.Field>
        <NativeSelect.Indicator />
      </NativeSelect.Root>
    </Around>
  );
}

interface FormProblemsProps {
  readonly problems: readonly string[];
}

/** What is wrong with a form as a whole, above its button. */
export function FormProblems({ problems }: FormProblemsProps) {
  return (
    <div role="alert">
      {problems.map((problem) => (
        <p key={problem} style={{ color: 'var(--break)', fontWeight: 600 }}>
          {problem}
        </p>
      ))}
    </div>
  );
}
