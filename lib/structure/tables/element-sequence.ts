/**
 * Order of the elements in formulae, from the most electronegative end of IUPAC's sequence to the other.
 * Source: N. G. Connelly et al., Nomenclature of Inorganic Chemistry, IUPAC Recommendations 2005, table VI (from memory).
 */
export const ELEMENT_SEQUENCE: string =
  "F Cl Br I At O S Se Te Po H D T N P As Sb Bi C Si Ge Sn Pb B Al Ga In Tl Zn Cd Hg Cu Ag Au Ni Pd Pt Co Rh Ir Fe Ru " +
  "Os Mn Tc Re Cr Mo W V Nb Ta Ti Zr Hf Sc Y La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Ac Th Pa U Np Pu Am Cm Be " +
  "Mg Ca Sr Ba Ra Li Na K Rb Cs Fr He Ne Ar Kr Xe Rn";
