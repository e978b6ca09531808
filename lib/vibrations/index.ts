/** Modes of a crystal at k = 0: sites to factor group, activities, counts. */
export { type Activity, activities } from "./activity.ts";
export { countedCharacters } from "./counted-characters.ts";
export {
  type FactorGroupModes,
  factorGroupModes,
  type ModeSpecies,
  type ModeTotals,
  type SiteModes,
} from "./factor-group.ts";
export { type IrrepAnswer, type ModesAnswer, modesAnswer, type SiteModesAnswer } from "./modes-answer.ts";
export { type VibratingSite, vibratingSites } from "./vibrating-sites.ts";
