/** Types with their watts: those that the shop keeps come before those of the table. */
import { LEGACY_LUMINAIRES } from '@/lib/surveys/schema/legacy-luminaires';
import type { ExistingElectrical, Luminaire } from '@/lib/surveys/schema';
import type { Survey } from './use-survey';

export interface KnownType {
  name: string;
  watts: number;
  wattsSource: Luminaire['wattsSource'];
  ballast: ExistingElectrical['ballast'];
  /** In words, for the list that is chosen from. */
  from: string;
}

export function knownTypes(survey: Pick<Survey, 'ownTypes'>): KnownType[] {
  const own = survey.ownTypes.map(({ data }) => ({ ...data, from: 'the shop’s own' }));
  const names = new Set(own.map((one) => one.name));
  const listed = LEGACY_LUMINAIRES.filter((one) => !names.has(one.name)).map(
    ({ name, watts, source, ballast }): KnownType => ({
      name,
      watts,
      ballast,
      wattsSource: source === 'typical' ? 'typical' : 'datasheet',
      from: source,
    }),
  );
  return [...own, ...listed];
}

export const isKnownType = (name: string, survey: Pick<Survey, 'ownTypes'>): boolean =>
  knownTypes(survey).some((one) => one.name === name);
