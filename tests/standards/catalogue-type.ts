import { issueRows, readCoinTypes, type CatalogueCoinType } from '#database/seeds/catalogue-files';
import { specificationForYear, type CoinTypeSpecification,
  type CoinTypeStandard } from '#shared/coin-types/coin-type-standard';
import { findDateAndMint, type DateAndMintFinding } from '#shared/coin-types/date-and-mint';

const types = new Map((await readCoinTypes()).map((type) => [type.slug, type]));

/** A coin type of the data files; throws where there is none. */
export function catalogueType(slug: string): CatalogueCoinType {
  const type = types.get(slug);
  if (!type) throw new Error(`the catalogue has no ${slug}`);
  return type;
}

export function standardOf(slug: string): CoinTypeStandard {
  return catalogueType(slug).standard;
}

export function specificationOf(slug: string, year: number): CoinTypeSpecification {
  return specificationForYear(standardOf(slug), year);
}

export function lookUp(slug: string, year: number, mintMark: string | null): DateAndMintFinding {
  const type = catalogueType(slug);
  return findDateAndMint(issueRows(type), type.standard.dateTable, year, mintMark);
}

/** Pairs of date and mint in the spans of the data file, before exceptions are laid over them. */
export function pairsListed(slug: string): number {
  return catalogueType(slug).issues.flatMap(({ years }) => years)
    .reduce((sum, [from, to]) => sum + to - from + 1, 0);
}
