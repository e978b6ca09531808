# Classes and irreducible characters of point groups, computed by GAP from generating matrices, one line per group:
#   Schoenflies symbol | classes | power maps | irreducible characters
# A class is size:order:determinant:trace of its elements. A power map is p:k1 k2 ...: the class that holds the p-th
# powers of each class, for every prime p that divides the order of the group. A character is its values class by
# class; E(n) is exp(2 pi i / n).
# Run: gap -q --nointeract tests/reference/gap/point-groups.g, or with -c "NAMES := [ \"Oh\" ];;" for some.

SetInfoLevel( InfoWarning, 0 );

JoinText := function( words, between )
  local text, i;
  text := "";
  for i in [ 1 .. Length( words ) ] do
    if i > 1 then Append( text, between ); fi;
    Append( text, words[i] );
  od;
  return text;
end;

# Rotation by 2 pi / n about z, in Cartesian axes.
Turn := function( n )
  local c, s;
  c := ( E(n) + E(n)^-1 ) / 2;
  s := ( E(n) - E(n)^-1 ) / ( 2 * E(4) );
  return [ [ c, -s, 0 ], [ s, c, 0 ], [ 0, 0, 1 ] ];
end;

Inversion := -IdentityMat( 3 );
AboutX := DiagonalMat( [ 1, -1, -1 ] );
AcrossX := -AboutX;
AcrossZ := DiagonalMat( [ 1, 1, -1 ] );
TwoZ := DiagonalMat( [ -1, -1, 1 ] );
Diagonal := [ [ 0, 0, 1 ], [ 1, 0, 0 ], [ 0, 1, 0 ] ]; # threefold about [111]
Exchange := [ [ 0, 1, 0 ], [ 1, 0, 0 ], [ 0, 0, 1 ] ]; # mirror normal to [1-10]
Golden := ( 1 + Sqrt( 5 ) ) / 2;
Fivefold := [ [ 1, -Golden, Golden - 1 ], [ Golden, Golden - 1, -1 ], [ Golden - 1, 1, Golden ] ] / 2;

# Families by the order n of the principal axis.
Generators := function( family, n )
  if family = "C" then return [ Turn( n ) ]; fi;
  if family = "S" then return [ Turn( n ) * AcrossZ ]; fi;
  if family = "Ch" then return [ Turn( n ), AcrossZ ]; fi;
  if family = "Cv" then return [ Turn( n ), AcrossX ]; fi;
  if family = "D" then return [ Turn( n ), AboutX ]; fi;
  if family = "Dh" then return [ Turn( n ), AboutX, AcrossZ ]; fi;
  if family = "Dd" then return [ Turn( 2 * n ) * AcrossZ, AboutX ]; fi;
end;

GROUPS := [
  [ "C1", [ IdentityMat( 3 ) ] ], [ "Ci", [ Inversion ] ], [ "Cs", [ AcrossZ ] ],
  [ "C2", Generators( "C", 2 ) ], [ "C2h", Generators( "Ch", 2 ) ], [ "D2", Generators( "D", 2 ) ],
  [ "C2v", Generators( "Cv", 2 ) ], [ "D2h", Generators( "Dh", 2 ) ],
  [ "C4", Generators( "C", 4 ) ], [ "S4", Generators( "S", 4 ) ], [ "C4h", Generators( "Ch", 4 ) ],
  [ "D4", Generators( "D", 4 ) ], [ "C4v", Generators( "Cv", 4 ) ], [ "D2d", Generators( "Dd", 2 ) ],
  [ "D4h", Generators( "Dh", 4 ) ],
  [ "C3", Generators( "C", 3 ) ], [ "S6", Generators( "S", 6 ) ], [ "D3", Generators( "D", 3 ) ],
  [ "C3v", Generators( "Cv", 3 ) ], [ "D3d", Generators( "Dd", 3 ) ],
  [ "C6", Generators( "C", 6 ) ], [ "C3h", Generators( "Ch", 3 ) ], [ "C6h", Generators( "Ch", 6 ) ],
  [ "D6", Generators( "D", 6 ) ], [ "C6v", Generators( "Cv", 6 ) ], [ "D3h", Generators( "Dh", 3 ) ],
  [ "D6h", Generators( "Dh", 6 ) ],
  [ "T", [ TwoZ, Diagonal ] ], [ "Th", [ TwoZ, Diagonal, Inversion ] ], [ "O", [ TwoZ, Diagonal, -Exchange ] ],
  [ "Td", [ TwoZ, Diagonal, Exchange ] ], [ "Oh", [ TwoZ, Diagonal, Exchange, Inversion ] ],
  [ "S8", Generators( "S", 8 ) ], [ "D4d", Generators( "Dd", 4 ) ], [ "D5d", Generators( "Dd", 5 ) ],
  [ "D6d", Generators( "Dd", 6 ) ], [ "I", [ TwoZ, Diagonal, Fivefold ] ],
  [ "Ih", [ TwoZ, Diagonal, Fivefold, Inversion ] ] ];

ClassText := function( class )
  local g;
  g := Representative( class );
  return JoinText( List( [ Size( class ), Order( g ), DeterminantMat( g ), TraceMat( g ) ], String ), ":" );
end;

PrintPointGroup := function( name, generators )
  local group, table, classes, maps, characters;
  group := Group( generators );
  table := CharacterTable( group );
  classes := List( ConjugacyClasses( table ), ClassText );
  maps := List( PrimeDivisors( Size( group ) ), p ->
    Concatenation( String( p ), ":", JoinText( List( PowerMap( table, p ), String ), " " ) ) );
  characters := List( Irr( table ), c -> JoinText( List( ValuesOfClassFunction( c ), String ), " " ) );
  Print( JoinText( [ name, JoinText( classes, " " ), JoinText( maps, ";" ), JoinText( characters, ";" ) ], "|" ),
         "\n" );
end;

SetPrintFormattingStatus( "*stdout*", false );
if not IsBound( NAMES ) then NAMES := List( GROUPS, entry -> entry[1] ); fi;
for entry in GROUPS do
  if entry[1] in NAMES then PrintPointGroup( entry[1], entry[2] ); fi;
od;
QUIT_GAP( 0 );
