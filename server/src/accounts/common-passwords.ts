/**
 * Passwords of ten characters or more that everybody tries first (from memory; shorter ones are
 * refused by length). Compared without case; a run of one repeated character counts as common too.
 */
const COMMON = new Set(
  `1234567890 12345678910 0123456789 0987654321 9876543210 123456789a 1234567891 123123123123 1q2w3e4r5t
  1q2w3e4r5t6y 1qaz2wsx3edc qwertyuiop qwerty12345 qwerty123456 qwertyuiop123 asdfghjkl1 asdfghjkl123
  zxcvbnm123 password12 password123 password1234 password12345 passwordpassword password01 passw0rd123
  iloveyou12 iloveyou123 iloveyou1234 abcdefghij abcdefghijk abcd123456 abc1234567 letmein123 letmein1234
  welcome123 welcome1234 administrator admin12345 admin123456 changeme123 sunshine123 princess123 football123
  baseball123 basketball superman123 dragon12345 monkey12345 michael123 trustno1trustno1 correcthorse
  correcthorsebatterystaple fiddle1234 fiddlefiddle banjobanjo pegwell123 pegwellpegwell`.split(/\s+/),
);

export function isCommonPassword(password: string): boolean {
  const folded = password.toLowerCase();
  return COMMON.has(folded) || /^(.)\1*$/u.test(folded);
}
