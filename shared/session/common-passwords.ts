/*
 * Passwords of eight characters or more that everyone tries first (from memory, common practice; no list was copied).
 * Compared in lower case.
 */
const WORDS = [
  ...['password', 'passw0rd', 'password1', 'password12', 'password123', 'password1234'],
  ...['12345678', '123456789', '1234567890', '12345678910', '123123123', '87654321', '987654321'],
  ...['11111111', '00000000', '88888888', '12341234', '11223344', '1q2w3e4r', '1q2w3e4r5t'],
  ...['qwertyui', 'qwertyuiop', 'qwerty123', 'qwerty1234', 'qwertz123', 'qwertzuiop', 'azertyuiop'],
  ...['asdfghjkl', 'asdfasdf', 'zxcvbnm1', '1qaz2wsx', 'abcd1234', 'abc12345', 'abcdefgh'],
  ...['iloveyou', 'iloveyou1', 'sunshine', 'princess', 'football', 'baseball', 'superman'],
  ...['trustno1', 'letmein1', 'letmein123', 'welcome1', 'welcome123', 'changeme', 'whatever'],
  ...['admin123', 'admin1234', 'administrator', 'computer', 'internet', 'secret123', 'default1'],
  ...[
    'workshop',
    'workshop1',
    'woodwork',
    'woodworking',
    'cuttingboard',
    'clamptide',
    'clamptide1',
  ],
];

export const COMMON_PASSWORDS: ReadonlySet<string> = new Set(WORDS);

/** Whether a password is among the first that anyone would try, or is one character over and over. */
export function isCommonPassword(password: string): boolean {
  return COMMON_PASSWORDS.has(password.toLowerCase()) || /^(.)\1*$/u.test(password);
}
