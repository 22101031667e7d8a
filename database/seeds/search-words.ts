import { channels, metals } from '#shared/reports/report-content';
import type { CatalogueCoinType, CatalogueTells } from './catalogue-files';

const shortestWord = 3;

/** Lower case, without accents, split where neither letter nor digit stands. */
export function wordsOf(text: string): readonly string[] {
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word.length >= shortestWord && /\p{L}/u.test(word));
}

/**
 * Words that a slip of spelling is mended to, each with how many names hold it. Only words of
 * the public catalogue: a mended word must not betray a report, nor a tell kept to the clubs.
 */
export function searchWords(types: readonly CatalogueCoinType[],
  tells: CatalogueTells): ReadonlyMap<string, number> {
  const names = [
    ...types.flatMap(({ name, issuer }) => [name, issuer]),
    ...metals, ...channels,
    ...tells.methods.map(({ name }) => name),
    ...tells.tells.filter(({ disclosure }) => disclosure === 'public').map(({ name }) => name),
  ];
  const weights = new Map<string, number>();
  for (const name of names) {
    for (const word of new Set(wordsOf(name))) weights.set(word, (weights.get(word) ?? 0) + 1);
  }
  return weights;
}
