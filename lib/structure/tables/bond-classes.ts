/**
 * Which elements bond how, when bonds are chosen by rule. The classes are chemical custom, not measurements; the
 * distances are chosen between those of the oxidation states named, which do not overlap.
 */

/** Elements that bond to each other by distance alone; metalloids included. */
export const NON_METALS = "H D T B C N O F Si P S Cl Ge As Se Br Kr Sb Te I Xe At";

export const HALOGENS = "F Cl Br I At";

/** Metals whose halides count as complexes where they are short. Alkali metals, Ca to Ra and lanthanoids are not. */
export const HALIDE_METALS =
  "Be Al Ga In Tl Sn Pb Bi Sc Ti V Cr Mn Fe Co Ni Cu Zn Zr Nb Mo Tc Ru Rh Pd Ag Cd Hf Ta W Re Os Ir Pt Au Hg U Np Pu";

/** Metals to which nitrogen, phosphorus and sulfur ligands bond. */
export const LIGAND_METALS =
  "Be Mg Al Ga In Sn Sc Ti V Cr Mn Fe Co Ni Cu Zn Zr Nb Mo Tc Ru Rh Pd Ag Cd Hf Ta W Re Os Ir Pt Au Hg";

/** Further metals to which carbon bonds. */
export const ORGANOMETALS = "Tl Pb Bi Y La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Th U";

/**
 * Metal, ligand and the distance in angstrom below which the shortest bond must lie for an oxo- or thio-anion or cation of
 * high oxidation state: V(IV), V(V), Cr(V), Cr(VI), Mn(V) to Mn(VII), Fe(VI), Mo(V), Mo(VI), W(V), W(VI), Re(VII),
 * uranyl. Long bonds of lower states begin above: Cr(III)-O 1.9, Mn(IV)-O 1.85, Fe(III)-O 1.85, Mo(IV)-O 1.97.
 */
export const SHORT_BONDS =
  "V-O 1.78 Cr-O 1.75 Mn-O 1.75 Fe-O 1.72 Mo-O 1.95 Tc-O 1.85 Ru-O 1.80 W-O 1.95 Re-O 1.95 Os-O 1.85 U-O 1.95 " +
  "Np-O 1.90 Pu-O 1.90 V-S 2.20 Mo-S 2.25 W-S 2.25 Re-S 2.20 V-Se 2.33 Mo-Se 2.38 W-Se 2.38";

/** Metals that count as part of an oxo-anion where they have exactly four oxygen neighbours. */
export const TETRAHEDRAL_METALS = "Al Ga";

/** Pairs of metals that bond, with the largest distance in angstrom: mercury(I). */
export const METAL_PAIRS = "Hg-Hg 2.65";
