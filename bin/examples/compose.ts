import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. G. L. Paul, A. W. Pryor, Acta Crystallographica B27 (1971) 2700 (from memory). */
export const EXAMPLE: CommandExample = {
  line: 'sitefold compose --group "R -3 c" --cell "a=5.070 c=16.82" --site "Na 6b" --site "N 6a" --site "O 18e x=0.2450"',
  output: `
#\\#CIF_1.1

data_structure
# Composed from a list of Wyckoff sites.
# space group R -3 c read as R -3 2/c, which leaves open: hexagonal or rhombohedral axes; R -3 2/c:H is used, cell and sites fit no other
# computed from the sites: NaNO3, Z = 6, 84.99 Da
# density computed from formula, Z and cell: 2.262 g cm^-3
# shortest distance: N-O 1.242 angstrom
_chemical_formula_sum             'N Na O3'
_chemical_formula_weight          84.994
_cell_formula_units_Z             6
_exptl_crystal_density_diffrn     2.2616
_cell_length_a                    5.07
_cell_length_b                    5.07
_cell_length_c                    16.82
_cell_angle_alpha                 90
_cell_angle_beta                  90
_cell_angle_gamma                 120
_cell_volume                      374.4316
_space_group_name_H-M_alt         'R -3 c'
_space_group_name_Hall            '-R 3 2"c'
_space_group_IT_number            167
loop_
 _space_group_symop_id
 _space_group_symop_operation_xyz
1  x,y,z
...
loop_
 _atom_site_label
 _atom_site_type_symbol
 _atom_site_fract_x
 _atom_site_fract_y
 _atom_site_fract_z
 _atom_site_occupancy
 _atom_site_site_symmetry_multiplicity
 _atom_site_site_symmetry_order
 _atom_site_Wyckoff_symbol
Na Na 0     0 0    1 6  6 b
N  N  0     0 0.25 1 6  6 a
O  O  0.245 0 0.25 1 18 2 e
`,
};
