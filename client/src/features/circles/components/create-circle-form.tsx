import type { Circle, CreateCircle } from '@pegwell/shared/contract/circles';
import { Stack } from '@chakra-ui/react';
import { Button } from '../../../ui/button';
import { FormProblems, SelectField, TextField } from '../../../ui/fields';
import { ownTimeZone, timeZones } from '../../../lib/format';
import { useProblemForm } from '../../../lib/use-problem-form';
import { createCircle } from '../api/create-circle';

/** Makes a circle with its maker as host. */
export function CreateCircleForm({
  onCreated,
}: {
  readonly onCreated: (circle: Circle) => Promise<void> | void;
}) {
  const { form, problems, submit } = useProblemForm<Required<CreateCircle>>({
    defaultValues: { name: '', timeZone: ownTimeZone() },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form noValidate onSubmit={submit(async (circle) => onCreated(await createCircle(circle)))}>
      <Stack gap="4" maxWidth="26rem">
        <TextField
          label="Name of the circle"
          hint="The people you play with, or the place."
          autoComplete="off"
          error={errors.name?.message}
          {...form.register('name', { validate: (name) => name.trim() !== '' || 'Give the circle a name.' })}
        />
        <SelectField
          label="Time zone"
          hint="Evenings start by this clock, wherever it is read."
          error={errors.timeZone?.message}
          {...form.register('timeZone')}
        >
          {timeZones().map((zone) => (
            <option key={zone} value={zone}>
              {zone.replaceAll('_', ' ')}
            </option>
          ))}
        </SelectField>
        <FormProblems problems={problems} />
        <div>
          <Button type="submit" busy={isSubmitting && 'Making it'}>
            Make the circle
          </Button>
        </div>
      </Stack>
    </form>
  );
}
