/** Point groups, their classes, species and labels; products, subduction and induction; tensors. Knows no crystals. */

export type { Matrix3, Vector3 } from "./cartesian.ts";
export { cartesianMatrices } from "./cartesian-matrices.ts";
export { type CharacterTable, type ConjugacyClass, characterOf, type Irrep, irrepIndex } from "./character-table.ts";
export { formatSum } from "./closed-form.ts";
export { type Correlation, correlations, subgroupOf } from "./correlation.ts";
export { crystalMatrices, orientedSymbols } from "./crystal-matrices.ts";
export {
  antisymmetricSquare,
  composeCharacters,
  decompose,
  directProduct,
  symmetricSquare,
} from "./decomposition.ts";
export type { AxisFrame } from "./direction.ts";
export { carriedMap, equivariantMaps, mapProduct, type PartnerMap, quarterTurn } from "./equivariant-maps.ts";
export { type SpeciesFunctions, speciesFunctions } from "./functions.ts";
export { irrepMatrices, type Rows } from "./irrep-matrices.ts";
export {
  type LinearGroupName,
  type LinearSpecies,
  linearCharacter,
  linearSpecies,
  linearTable,
  parseLinearSpecies,
  subduceLinear,
} from "./linear-group.ts";
export { type LinearRow, linearGroupTable, linearProduct } from "./linear-table.ts";
export { type MolecularAxes, type MolecularGroup, molecularGroup, orthogonalGroup } from "./molecular-group.ts";
export { type PointGroup, pointGroup } from "./point-group.ts";
export { type PointGroupTable, pointGroupTable } from "./point-group-table.ts";
export type { ReferenceAxes } from "./reference-axes.ts";
export { formatRoot, type RootForm, rootForm } from "./root-form.ts";
export { type CrystalClass, type CrystalSystem, crystalClasses } from "./schoenflies.ts";
export { findSpecies, plainLabel } from "./species-text.ts";
export { embedding, induce, induceBy, nearestEmbedding, subduce, subduceBy } from "./subduction.ts";
export {
  axialCharacter,
  hyperRamanGeneralCharacter,
  symmetricCubeCharacter,
  symmetricSquareCharacter,
  vectorCharacter,
} from "./tensor-characters.ts";
export { matrixEntries, type PartnerTensor, type TensorForm, type TensorForms, tensorForms } from "./tensor-forms.ts";
export type { TensorKind } from "./tensor-space.ts";
