/** The text of static/examples/README.txt. */
export const README = `Example data of Kithline
========================

Everything here is invented: the Merrow Range, its climates, the lanternfrogs
(Lychnorana), the moss beetles (Merrobryus), their trees, niches and records.
The coordinates lie in an empty stretch of ocean. Nothing may be concluded from
these files about any real species or place.

Licence: CC0 1.0 (public domain dedication). Use them for anything.
Made by "npm run examples" from fixed seeds; the same bytes on every run.

merrow-range/
  temperature.asc        mean temperature, degrees Celsius
  rainfall.asc           yearly rainfall, mm
                         160 x 120 cells of 2.5 minutes, longitude and latitude,
                         WGS84; -9999 is the sea

lanternfrogs/            26 species whose niches changed along the tree
  summary-tree.nwk       the dated tree, ages in Ma (million years), root 18.4
  posterior-trees.nex    200 trees around it, for the uncertainty of the dating
  overlap-d.csv          Schoener's D between the maps, full square
  overlap-i.csv          Warren's I (as corrected in 2011), full square
  maps/*.asc             one suitability map a species, 0 to 1, intensities
  records.csv            30 to 90 records a species under Darwin Core names, with
                         temperature and rainfall of their cells
  positions.csv          mean climate of the records with its standard error,
                         breadth and number of records, one row a species
  distance-km.csv        km between the middles of the species' records, a covariate
  truth.json             what all this was made from: seed, rates, true niches

moss-beetles/            18 species whose niches the tree had no say in
  summary-tree.nwk, overlap-d.csv, overlap-i.csv, records.csv, truth.json

messy/                   eight of the lanternfrogs as a colleague might send them
  half-matrix.csv        lower half, semicolons, decimal commas
  pair-list.csv          one pair a line, underscored names, one misspelt
  tree.nwk               one species more than the matrices, a quoted name, a
                         comment, several lines

The matrices come from the maps: land cells only, weighted by the cosine of the
latitude. The seeds were chosen among several hundred so that the lanternfrogs
show a fall of overlap with age that is clear but not spectacular, and the moss
beetles show none.
`;
