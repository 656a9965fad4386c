import {
  changeEmailSchema,
  changePasswordSchema,
  confirmedSchema,
  confirmSchema,
  deleteAccountSchema,
  forgotSchema,
  loginSchema,
  meSchema,
  registerSchema,
  renameSchema,
  resetSchema,
  signedInSchema,
  signInsSchema,
  userSchema,
} from '@pegwell/shared/contract/accounts';
import { createZodDto } from 'nestjs-zod';

export class RegisterDto extends createZodDto(registerSchema) {}
export class LoginDto extends createZodDto(loginSchema) {}
export class SignedInDto extends createZodDto(signedInSchema) {}
export class MeDto extends createZodDto(meSchema) {}
export class UserDto extends createZodDto(userSchema) {}
export class RenameDto extends createZodDto(renameSchema) {}
export class ChangePasswordDto extends createZodDto(changePasswordSchema) {}
export class ChangeEmailDto extends createZodDto(changeEmailSchema) {}
export class DeleteAccountDto extends createZodDto(deleteAccountSchema) {}
export class ForgotDto extends createZodDto(forgotSchema) {}
export class ResetDto extends createZodDto(resetSchema) {}
export class ConfirmDto extends createZodDto(confirmSchema) {}
export class ConfirmedDto extends createZodDto(confirmedSchema) {}
export class SignInsDto extends createZodDto(signInsSchema) {}
