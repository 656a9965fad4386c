import { PASSWORD_MAX_BYTES, PASSWORD_MIN_CHARACTERS } from '@pegwell/shared/contract/accounts';
import { TextField, type TextFieldProps } from '../../../ui/fields';

/** A password that is to be: its rules are said before they are broken. */
export function NewPasswordField(props: TextFieldProps) {
  return (
    <TextField
      hint={`${PASSWORD_MIN_CHARACTERS} characters or more, up to ${PASSWORD_MAX_BYTES} bytes; four unrelated words do well.`}
      type="password"
      autoComplete="new-password"
      {...props}
    />
  );
}
