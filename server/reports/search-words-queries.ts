import type { SearchSuggestion } from '#shared/reports/report-view';
import type { Transaction } from '../db/database';
import { foldWord, nearestWord } from './spelling';

/** Below this likeness a word is not looked at; a swap of two letters comes to about a quarter. */
const leastLikeness = 0.2;

/**
 * The text with each word that finds nothing turned into the nearest word of the catalogue, or
 * undefined where there is nothing to mend. Two statements at most.
 */
export async function mendText(trx: Transaction, text: string): Promise<string | undefined> {
  const words = [...new Set((text.match(/\p{L}{4,}/gu) ?? []).map(foldWord))].slice(0, 12);
  if (!words.length) return undefined;
  const { rows }: { rows: { word: string; near: string[] }[] } = await trx.raw(
    `select w.word, array(select sw.word from search_word sw
         where similarity(sw.word, w.word) >= ?
         order by similarity(sw.word, w.word) desc, sw.weight desc, sw.word limit 8) as near
     from unnest(?::text[]) as w (word)
     where not exists (select from visible_report_search s where s.words @@ search_query(w.word))`,
    [leastLikeness, words]);
  const mended = new Map(rows.flatMap(({ word, near }) => {
    const nearest = nearestWord(word, near);
    return nearest === undefined ? [] : [[word, nearest]];
  }));
  if (!mended.size) return undefined;
  return text.replace(/\p{L}{4,}/gu, (word) => mended.get(foldWord(word)) ?? word);
}

/** Coin types, tells that the actor may see, and words of the catalogue; at most `limit`. */
export async function suggest(
  trx: Transaction, text: string, limit: number,
): Promise<SearchSuggestion[]> {
  const start = `${text.replace(/[\\%_]/g, '\\$&')}%`;
  const lastWord = foldWord(/[\p{L}\p{N}]+$/u.exec(text)?.[0] ?? '');
  const { rows } = await trx.raw(
    `(select 'coin_type' as kind, slug as value, name as label from coin_type
       where name ilike ? or name ilike '% ' || ? order by position, slug limit ?)
     union all
     (select 'tell', id, name from tell where name ilike ? or name ilike '% ' || ?
       order by position limit ?)
     union all
     (select 'word', word, word from search_word where ? <> '' and word like ? || '%'
       and word <> ? order by weight desc, word limit ?)`,
    [start, start, limit, start, start, limit, lastWord, lastWord, lastWord, limit]);
  return rows.slice(0, limit);
}
