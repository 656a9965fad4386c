import { useState } from 'react';
import type { BaseSyntheticEvent } from 'react';
import { useForm } from 'react-hook-form';
import type { FieldValues, Path, UseFormProps, UseFormReturn } from 'react-hook-form';
import { ProblemError, sentenceOf } from './problem';
import type { ProblemIssue } from './problem';

export interface ProblemForm<T extends FieldValues> {
  readonly form: UseFormReturn<T>;
  /** What concerns no single field, as sentences to show above the button; empty when all is well. */
  readonly problems: readonly string[];
  /** For `<form onSubmit>`: checks, calls `send`, and puts what the server refuses beside its fields. */
  readonly submit: (send: (values: T) => Promise<unknown>) => (event?: BaseSyntheticEvent) => Promise<void>;
  /** For a problem that comes by another way than `submit`. */
  readonly show: (error: unknown) => void;
}

/** The registered field that an issue's path names: itself, or the nearest field it lies inside. */
function fieldFor(path: string, fields: readonly string[]): string | undefined {
  return fields
    .filter((field) => path === field || path.startsWith(`${field}.`))
    .sort((a, b) => b.length - a.length)[0];
}

/**
 * A form whose refusals land where they belong: every `errors[{path, message}]` of a problem goes to
 * its field, the rest stands above the button. What was typed stays.
 */
export function useProblemForm<T extends FieldValues>(options?: UseFormProps<T>): ProblemForm<T> {
  const form = useForm<T>(options);
  const [problems, setProblems] = useState<readonly string[]>([]);

  const show = (error: unknown) => {
    if (!(error instanceof ProblemError)) return setProblems([sentenceOf(error)]);
    const fields = Object.keys(flatten(form.getValues()));
    const homeless: ProblemIssue[] = [];
    const placed = new Map<string, string[]>();
    for (const issue of error.errors) {
      const field = fieldFor(issue.path, fields);
      if (field) placed.set(field, [...(placed.get(field) ?? []), issue.message]);
      else homeless.push(issue);
    }
    let first = true;
    for (const [field, messages] of placed) {
      form.setError(
        field as Path<T>,
        { type: 'server', message: messages.join(' ') },
        { shouldFocus: first },
      );
      first = false;
    }
    const rest = homeless.map((issue) => issue.message);
    setProblems(placed.size || rest.length ? rest : [error.detail]);
  };

  const submit: ProblemForm<T>['submit'] = (send) => (event) => {
    setProblems([]);
    return form.handleSubmit(async (values) => {
      try {
        await send(values);
      } catch (error) {
        show(error);
      }
    })(event);
  };

  return { form, problems, submit, show };
}

/** `{a: {b: 1}, c: [2]}` to `{'a': ..., 'a.b': 1, 'c': ..., 'c.0': 2}`: every path a field may have. */
function flatten(value: unknown, prefix = ''): Record<string, true> {
  if (typeof value !== 'object' || value === null) return {};
  return Object.entries(value).reduce<Record<string, true>>((paths, [key, inner]) => {
    const path = prefix ? `${prefix}.${key}` : key;
    return { ...paths, [path]: true, ...flatten(inner, path) };
  }, {});
}
