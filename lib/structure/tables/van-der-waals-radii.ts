/**
 * Van der Waals radii in angstrom. Non-metals: A. Bondi, Journal of Physical Chemistry 68 (1964) 441-451; all others:
 * S. Alvarez, Dalton Transactions (2013) 8617-8636. Figures from memory.
 */
export const BONDI_RADII =
  "H 1.20 He 1.40 C 1.70 N 1.55 O 1.52 F 1.47 Ne 1.54 Si 2.10 P 1.80 S 1.80 Cl 1.75 Ar 1.88 As 1.85 Se 1.90 Br 1.85 " +
  "Kr 2.02 Te 2.06 I 1.98 Xe 2.16";

export const ALVAREZ_RADII =
  "Li 2.12 Be 1.98 B 1.91 Na 2.50 Mg 2.51 Al 2.25 K 2.73 Ca 2.62 Sc 2.58 Ti 2.46 V 2.42 Cr 2.45 Mn 2.45 Fe 2.44 Co 2.40 " +
  "Ni 2.40 Cu 2.38 Zn 2.39 Ga 2.32 Ge 2.29 Rb 3.21 Sr 2.84 Y 2.75 Zr 2.52 Nb 2.56 Mo 2.45 Tc 2.44 Ru 2.46 Rh 2.44 Pd 2.15 " +
  "Ag 2.53 Cd 2.49 In 2.43 Sn 2.42 Sb 2.47 Cs 3.48 Ba 3.03 La 2.98 Ce 2.88 Pr 2.92 Nd 2.95 Sm 2.90 Eu 2.87 Gd 2.83 Tb 2.79 " +
  "Dy 2.87 Ho 2.81 Er 2.83 Tm 2.79 Yb 2.80 Lu 2.74 Hf 2.63 Ta 2.53 W 2.57 Re 2.49 Os 2.48 Ir 2.41 Pt 2.29 Au 2.32 Hg 2.45 " +
  "Tl 2.47 Pb 2.60 Bi 2.54 Th 2.93 Pa 2.88 U 2.71 Np 2.82 Pu 2.81 Am 2.83";
