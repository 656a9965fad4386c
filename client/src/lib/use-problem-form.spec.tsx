import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { ProblemError } from './problem';
import { useProblemForm } from './use-problem-form';

const refusal = (errors: readonly { path: string; message: string }[]) =>
  new ProblemError({ status: 422, code: 'cannot-be', detail: 'Some of this cannot be.', errors });

function Form({ error }: { readonly error: Error | null }) {
  const { form, problems, submit } = useProblemForm({
    defaultValues: { title: '', tunings: { fiddle: '' } },
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={submit(() => (error ? Promise.reject(error) : Promise.resolve()))}>
      <input aria-label="Title" {...form.register('title')} />
      <p data-testid="title">{errors.title?.message}</p>
      <input aria-label="Fiddle" {...form.register('tunings.fiddle')} />
      <p data-testid="fiddle">{errors.tunings?.fiddle?.message}</p>
      <p data-testid="form">{problems.join('|')}</p>
      <button>Save</button>
    </form>
  );
}

async function saved(error: Error | null) {
  render(<Form error={error} />);
  await userEvent.type(screen.getByLabelText('Title'), 'Stone Weir');
  await userEvent.click(screen.getByRole('button'));
  return (id: string) => screen.getByTestId(id).textContent;
}

describe('useProblemForm', () => {
  it('puts each refusal at its field, also one from deeper inside, and the rest above the button', async () => {
    const shown = await saved(
      refusal([
        { path: 'title', message: 'A tune of this name is here.' },
        { path: 'tunings.fiddle.0.tuning', message: '4 strings expected, G D A read.' },
        { path: 'version', message: 'It is old.' },
      ]),
    );
    expect(shown('title')).toBe('A tune of this name is here.');
    expect(shown('fiddle')).toBe('4 strings expected, G D A read.');
    expect(shown('form')).toBe('It is old.');
    expect(document.activeElement).toBe(screen.getByLabelText('Title'));
  });

  it('shows the sentence of a problem without places', async () => {
    const shown = await saved(refusal([]));
    expect(shown('form')).toBe('Some of this cannot be.');
  });

  it('keeps what was typed, and has a sentence for what nobody foresaw', async () => {
    const shown = await saved(new Error('undefined is not a function'));
    expect(shown('form')).toMatch(/went wrong/);
    expect(screen.getByLabelText<HTMLInputElement>('Title').value).toBe('Stone Weir');
  });

  it('is quiet when all is well', async () => {
    const shown = await saved(null);
    expect(shown('form')).toBe('');
  });
});
