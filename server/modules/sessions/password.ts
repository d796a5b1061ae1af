import argon2 from 'argon2';

/** OWASP's floor for Argon2id: 19 MiB, two passes, one lane (26 ms here). */
const PARAMETERS = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

let queue: Promise<unknown> = Promise.resolve();
/** One hash at a time: a flood of sign-ins must not take the machine's memory. */
const inTurn = <T>(work: () => Promise<T>): Promise<T> => {
  const result = queue.then(work, work);
  queue = result.catch(() => undefined);
  return result;
};

export const hashPassword = (password: string): Promise<string> =>
  inTurn(() => argon2.hash(password, PARAMETERS));

let decoy: Promise<string> | null = null;

/** Takes the same time whether the account exists or not. */
export const verifyPassword = async (hash: string | null, password: string): Promise<boolean> => {
  decoy ??= hashPassword('a password that nobody has');
  const against = hash ?? (await decoy);
  const matches = await inTurn(() => argon2.verify(against, password));
  return hash !== null && matches;
};
