import bcrypt from 'bcrypt';

/** 11 takes some 0.11 s on the machine the registry was measured on. */
const cost = 11;
const testCost = 5;

export interface Passwords {
  hash(password: string): Promise<string>;
  /** False too where there is no hash, after the same time: an unknown address can't be told. */
  matches(password: string, hash: string | null | undefined): Promise<boolean>;
}

export function createPasswords(environment: string): Passwords {
  const rounds = environment === 'test' ? testCost : cost;
  const nobody = bcrypt.hash('nobody has this password', rounds);
  return {
    hash: (password) => bcrypt.hash(password, rounds),
    matches: async (password, hash) => {
      const equal = await bcrypt.compare(password, hash ?? await nobody);
      return equal && typeof hash === 'string';
    },
  };
}
