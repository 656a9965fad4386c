import { loginSchema, meSchema, registerSchema, signedInSchema } from '@pegwell/shared/contract/accounts';
import { createZodDto } from 'nestjs-zod';

export class RegisterDto extends createZodDto(registerSchema) {}
export class LoginDto extends createZodDto(loginSchema) {}
export class SignedInDto extends createZodDto(signedInSchema) {}
export class MeDto extends createZodDto(meSchema) {}
