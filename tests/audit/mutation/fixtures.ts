/**
 * Forty sound fixtures for the mutation suite: all crystal systems and centrings, molecules and salts, special positions
 * with and without free coordinates; none disordered, none of more than some two hundred atoms in the cell.
 */
export const CHOSEN: readonly string[] = [
  ..."albite alpha-quartz anatase anhydrite aragonite arcanite azurite barite barium-titanate benzene".split(" "),
  ..."beryl brucite calcite carbon-dioxide cassiterite cerussite chalcanthite cinnabar corundum crocoite".split(" "),
  ..."dolomite epsomite forsterite-pbnm goethite gypsum hexamethylenetetramine ilmenite lithium-niobate".split(" "),
  ..."malachite monazite naphthalene niter orpiment pyrite realgar rutile scheelite spinel urea zircon".split(" "),
];
