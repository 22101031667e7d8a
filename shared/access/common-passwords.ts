/**
 * Well-known passwords of 12 characters or more, from memory of lists that were made public
 * over the years; lower case. Shorter ones need no entry, since length alone refuses them.
 */
export const commonPasswords: ReadonlySet<string> = new Set([
  'administrator', 'administrator1', 'adminadminadmin', 'basketball123', 'changemenow1',
  'chocolate123', 'computer1234', 'correct horse battery staple', 'correcthorsebatterystaple',
  'defaultpassword', 'dragonball123', 'football1234', 'iloveyou1234', 'iloveyoubaby',
  'iloveyouforever', 'iloveyousomuch', 'letmeinletmein', 'liverpoolfc1', 'manchesterunited',
  'masterofpuppets', 'mypassword123', 'mysecurepassword', 'newpassword1', 'nopassword123',
  'onceuponatime', 'passwordpassword', 'princess1234', 'q1w2e3r4t5y6', 'q1w2e3r4t5y6u7i8',
  'qazwsxedcrfv', 'qwertyuiopasdfghjklzxcvbnm', 'secretpassword', 'spongebob123',
  'superman1234', 'supersecret1', 'thisismypassword', 'trustno1trustno1', 'trustnoone123',
  'welcome12345', 'whatthefuck1', '1q2w3e4r5t6y', '1q2w3e4r5t6y7u8i', '1qaz2wsx3edc',
  '1qaz2wsx3edc4rfv', '123qweasdzxc', 'zaq12wsxcde3', 'abcd1234efgh', 'a1b2c3d4e5f6',
]);

/** Words that do not make a password when only digits and marks stand round them. */
export const commonWords: ReadonlySet<string> = new Set([
  'admin', 'administrator', 'baseball', 'changeme', 'coin', 'coinclub', 'coincollector', 'coins',
  'computer', 'counterfeit', 'dragon', 'football', 'guest', 'iloveyou', 'letmein', 'login',
  'master', 'member', 'moderator', 'monkey', 'numismatics', 'pass', 'passphrase', 'password',
  'princess', 'qwerty', 'qwertyuiop', 'registrar', 'root', 'secret', 'secretary', 'summer',
  'sunshine', 'superman', 'test', 'touchneedle', 'user', 'welcome', 'winter',
]);
