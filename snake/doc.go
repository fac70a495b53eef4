// Package snake builds snake graphs and band graphs, and works with their
// perfect matchings: how many there are, which they are, what they weigh.
//
// # Conventions
//
// A snake graph is a chain of n unit tiles in the square lattice, glued along
// edges. Tile 1 sits at the origin. Between tile i and tile i+1 stands the
// turn letter w(i), so n tiles carry a word of n−1 letters.
//
//   - Shape: the glue between tiles i and i+1 goes right when w(i) = R and i
//     is odd, or w(i) = L and i is even; otherwise it goes up. Equal
//     neighbouring letters therefore turn the snake (zigzag), different ones
//     keep its direction (straight).
//   - Minimal matching: it lies on the boundary and holds horizontal sides of
//     odd tiles and vertical sides of even tiles only. Flipping a tile up
//     turns an odd tile from horizontal to vertical, an even one the other way.
//   - Every matching is the set of tiles flipped on the way up from the
//     minimal one. These sets are the order ideals of the fence poset on the
//     tiles: w(i) = R puts tile i+1 over tile i, w(i) = L puts tile i over
//     tile i+1. So [Matching] stores flipped tiles, and meet, join and height
//     are intersection, union and size.
//   - Order: a matching reads as the 0/1 string of its tiles, tile 1 first, 1
//     for flipped; listings are in increasing lexicographic order of it, from
//     the minimal matching to the maximal one.
//   - A single edge is a graph too: no tile, one matching. It has no word; the
//     empty word has one tile and two matchings.
//
// Counting runs on vertices and edges: one 2 × 2 transfer matrix for each tile,
// over the two states "both end vertices of the glue edge are still free" and
// "both are covered".
//
// Sources: "Cluster algebras and continued fractions", Compositio Math. 154
// (2018), for shapes and numbers; "Positivity for cluster algebras from
// surfaces", Adv. Math. 227 (2011), for labels, weights and flips; "Bases for
// cluster algebras from surfaces", Compositio Math. 149 (2013), for bands
// (memory).
package snake
