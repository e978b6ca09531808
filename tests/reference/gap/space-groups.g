# Facts about the 230 space-group types from the crystallographic groups of GAP (package cryst), one line per type:
#   number | order of the point group | lattice points per cell | Wyckoff positions | generators
# A Wyckoff position is dimension:multiplicity:order of its site-symmetry group, multiplicity per cell of the setting
# that GAP uses. A generator is its matrix row by row and its translation, for column coordinates. GAP's groups act on
# rows from the right, so every matrix is transposed before it is printed.
# Run: gap -q --nointeract tests/reference/gap/space-groups.g (minutes), or with -c "NUMBERS := [ 1 .. 15 ];;" for some

SetInfoLevel( InfoWarning, 0 );
if LoadPackage( "cryst" ) <> true then
  Print( "the GAP package cryst is missing\n" );
  QUIT_GAP( 1 );
fi;

JoinText := function( words, between )
  local text, i;
  text := "";
  for i in [ 1 .. Length( words ) ] do
    if i > 1 then Append( text, between ); fi;
    Append( text, words[i] );
  od;
  return text;
end;

GeneratorText := function( g )
  local m, numbers;
  m := TransposedMat( g );
  numbers := Concatenation( m[1]{[1..3]}, m[2]{[1..3]}, m[3]{[1..3]}, [ m[1][4], m[2][4], m[3][4] ] );
  return JoinText( List( numbers, String ), " " );
end;

PositionText := function( w, order, points )
  local size;
  size := Size( WyckoffStabilizer( w ) );
  return JoinText( List( [ Length( WyckoffBasis( w ) ), points * order / size, size ], String ), ":" );
end;

PrintSpaceGroup := function( number )
  local group, order, points, positions, generators;
  group := SpaceGroupOnRightIT( 3, number );
  order := Size( PointGroup( group ) );
  points := 1 / AbsInt( DeterminantMat( TranslationBasis( group ) ) );
  positions := List( WyckoffPositions( group ), w -> PositionText( w, order, points ) );
  Sort( positions );
  generators := List( GeneratorsOfGroup( group ), GeneratorText );
  Print( JoinText( [ String( number ), String( order ), String( points ), JoinText( positions, " " ),
                     JoinText( generators, ";" ) ], "|" ), "\n" );
end;

SetPrintFormattingStatus( "*stdout*", false );
if not IsBound( NUMBERS ) then NUMBERS := [ 1 .. 230 ]; fi;
for number in NUMBERS do
  PrintSpaceGroup( number );
od;
QUIT_GAP( 0 );
