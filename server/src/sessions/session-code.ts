import { randomInt } from 'node:crypto';

/** Digits and capitals of which no two are mistaken for each other: no 0 and O, no 1, I and L. */
export const CODE_LETTERS = '23456789ABCDEFGHJKMNPQRSTUVWXYZ';
export const CODE_LENGTH = 8;

/** 31 to the 8th is 8.5e11: with a thousand evenings under way, one try in a billion hits one. */
export function makeCode(): string {
  return Array.from({ length: CODE_LENGTH }, () => CODE_LETTERS[randomInt(CODE_LETTERS.length)]).join('');
}

/** As typed by a person: any case, with spaces or hyphens. */
export function normalCode(typed: string): string {
  return typed.toUpperCase().replace(/[\s-]/g, '');
}
