/**
 * Bond-valence parameters R0 in angstrom: cation with its oxidation state, then anions with R0; s = exp((R0 - d) / 0.37).
 * Source: N. E. Brese and M. O'Keeffe, Acta Crystallographica B47 (1991) 192-197, and for oxides I. D. Brown and D.
 * Altermatt, Acta Crystallographica B41 (1985) 244-247 (figures from memory; the two lists differ by 0.01 to 0.03).
 */
export const BOND_VALENCES: string =
  "Ag1 O 1.805 F 1.80 Cl 2.09 Br 2.22 S 2.15; Al3 O 1.651 F 1.545 Cl 2.03 Br 2.20 S 2.13 N 1.79; As3 O 1.789 F 1.70 Cl 2.16 " +
  "S 2.26; As5 O 1.767 F 1.62 S 2.28; B3 O 1.371 F 1.31 Cl 1.74 N 1.47; Ba2 O 2.29 F 2.19 Cl 2.69 Br 2.88 S 2.77; Be2 O 1.381 " +
  "F 1.28 Cl 1.76; Bi3 O 2.09 F 1.99 Cl 2.48 Br 2.62 S 2.55; C4 O 1.39; Ca2 O 1.967 F 1.842 Cl 2.37 Br 2.507 S 2.45; Cd2 O " +
  "1.904 F 1.811 Cl 2.23 Br 2.35 S 2.29; Ce3 O 2.151 F 2.036; Ce4 O 2.028 F 1.995; Co2 O 1.692 F 1.64 Cl 2.01; " +
  "Co3 O 1.70 F 1.62; Cr3 O 1.724 F 1.64 Cl 2.08; Cr6 O 1.794; Cs1 O 2.42 F 2.33 Cl 2.79 Br 2.95 I 3.18; Cu1 O 1.593 Cl 1.85 " +
  "Br 1.99 I 2.16 S 1.86; Cu2 O 1.679 F 1.594 Cl 2.00 S 2.05; Dy3 O 2.036 F 1.922; Er3 O 2.010 F 1.906; Eu2 O 2.147 F 2.04; " +
  "Eu3 O 2.076 F 1.961; Fe2 O 1.734 F 1.65 Cl 2.06 S 2.12; Fe3 O 1.759 F 1.67 Cl 2.09 S 2.15; Ga3 O 1.730 F 1.62 Cl 2.07 S " +
  "2.16; Gd3 O 2.065 F 1.95; Ge4 O 1.748 F 1.66 S 2.22; Hf4 O 1.923 F 1.85; Hg2 O 1.93 F 1.90 Cl 2.25 Br 2.38 S 2.32; Ho3 O " +
  "2.023 F 1.908; I5 O 2.00; In3 O 1.902 F 1.79 Cl 2.28 S 2.36; K1 O 2.13 F 1.99 Cl 2.52 Br 2.66 I 2.88; La3 O 2.172 F 2.057; " +
  "Li1 O 1.466 F 1.36 Cl 1.91 Br 2.02 I 2.22; Lu3 O 1.971 F 1.876; Mg2 O 1.693 F 1.581 Cl 2.08 Br 2.28; Mn2 O 1.790 F 1.698 " +
  "Cl 2.13 S 2.22; Mn3 O 1.760 F 1.66; Mn4 O 1.753 F 1.71; Mn7 O 1.79; Mo6 O 1.907; N3 O 1.361; N5 O 1.432; Na1 O 1.80 F 1.677 Cl 2.15 Br " +
  "2.33 I 2.56; Nb5 O 1.911 F 1.87; Nd3 O 2.117 F 2.008; Ni2 O 1.654 F 1.599 Cl 2.02; P5 O 1.604 S 2.13; Pb2 O 2.112 F 2.03 Cl " +
  "2.53 Br 2.64 I 2.83 S 2.55; Pb4 O 2.042; Pr3 O 2.135 F 2.022; Rb1 O 2.26 F 2.16 Cl 2.65 Br 2.78 I 3.01; S4 O 1.644; S6 O " +
  "1.624; Sb3 O 1.973 F 1.90 Cl 2.35 S 2.45; Sb5 O 1.942 F 1.80; Sc3 O 1.849 F 1.76; Se4 O 1.811; Se6 O 1.788; Si4 O 1.624 F " +
  "1.58 S 2.13; Sm3 O 2.088 F 1.977; Sn2 O 1.984 F 1.925 Cl 2.36 S 2.45; Sn4 O 1.905 F 1.84 Cl 2.28 S 2.40; Sr2 O 2.118 F 2.019 " +
  "Cl 2.51 Br 2.68 S 2.59; Ta5 O 1.920 F 1.88; Tb3 O 2.049 F 1.936; Te4 O 1.977; Te6 O 1.917; Th4 O 2.167 F 2.07; Ti3 O 1.791; " +
  "Ti4 O 1.815 F 1.76; Tl1 O 2.172 F 2.15 Cl 2.56; Tl3 O 2.003; U4 O 2.112 F 2.034; U6 O 2.075; V3 O 1.743 F 1.702; V4 O 1.784; " +
  "V5 O 1.803; W6 O 1.921; Y3 O 2.014 F 1.904; Yb3 O 1.985; Zn2 O 1.704 F 1.62 Cl 2.01 Br 2.15 S 2.09; Zr4 O 1.937 F 1.854; " +
  "H1 O 0.95";
