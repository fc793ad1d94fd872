/** The help text of `derive`. */
export const deriveUsage = `cosmology-cells derive FILE --add QUANTITIES [options]

Reads one model a row and writes the rows with quantities added as columns. The columns of the file
that have a name of the vocabulary (hubble, baryonDensity, neutrinos.massSum, ...) make the model; all
others are carried through untouched. FILE ends in .csv, .tsv, .jsonl or .parquet; - is standard input.

  --add LIST            quantities to add: "age, lastScatteringRedshift, luminosityDistance(1.1)"
  --out FILE            where the rows go; - (default) is standard output. The end of the name says the
                        format; without one it is that of the input
  --map LIST            what the file calls otherwise: "H0=hubble, Om=matterFraction". The columns keep
                        their own names in the output
  --set LIST            fills what the file lacks, a whole column or single empty cells:
                        "neutrinos.effectiveNumber=3.046, conventions.closure=radiationOnTop"
  --given LIST          columns of derived numbers that are part of the model: "acousticAngle" in place
                        of hubble. Without it they stand in where exactly as many parameters are missing,
                        and are carried through where none is
  --solve-for LIST      parameters that a derived number determines instead of their defaults: "curvature"
  --solve-near LIST     where two models meet the givens, the nearest to these values: "curvature=0"
  --recombination TIER  calibrated (default), peebles or saha; the same as --set recombination=TIER
  --fast                the batch engine on all cores: accuracy 1e-6 or better, thousands of rows a second.
                        Without it every row takes the full computation of a cell, some 1e-10, a hundred
                        rows a second. What the engine does not compute takes the full computation;
                        standard error says which it was
  --workers N           threads of --fast, 0 to 256; default one a core. The digits do not depend on it
  --digits N            significant digits of the added columns, 1 to 17; default 15, with --fast 9
  --errors              adds a column NAME.error behind each: the absolute numerical error estimate
  --bad-rows refuse     (default) the first bad row ends the work; nothing is left under the name of --out
  --bad-rows keep       a bad row is written with empty cells, and its reason in the column "problem"
  --problem-column NAME another name for that column
  --header no           leaves the header out of the output (csv, tsv)
  --format FORMAT       format of standard input or output where no file name says it: csv (default),
                        tsv, jsonl
  --progress            tells rows done and rate on standard error (default where that is a terminal)
  --help                this text

LIST options may be given several times. In csv and tsv the first row names the columns, lines that
begin with # are comments and are not written again, a list is 0.06;0, and a name such as
comovingDistance(0.5,1) is quoted. A model's cell that is empty is refused unless --set fills it; a
field that a JSON line leaves out counts as not given. In JSON lines a model may also be nested:
{"neutrinos": {"massSum": 0.1}}. darkEnergy.equation holds a formula in z or in a, such as
-1 + 0.1 z/(1 + z); darkEnergy.table, in JSON lines, {"redshifts": [0, 1], "values": [-1, -0.9]}.
Numbers are decimal, with a point; NaN and 1e400 are refused.
Rows keep their order, and each depends on itself alone. Standard output carries only data.
Parquet is read from a file, not from standard input; text columns become numbers there when all their
cells in the first 32768 rows are. With --fast a derived number can stand in place of H0, and of nothing
else; no warnings about single numbers are given.

  cosmology-cells derive models.csv --add "age, acousticAngle" --recombination peebles --out derived.csv
  cosmology-cells derive chain.tsv --map "H0=hubble, Om=matterFraction" --set "baryonDensity=0.0224" \\
      --add "dragSoundHorizon, volumeDistance(0.38)" --bad-rows keep --out chain.jsonl
  cat models.csv | cosmology-cells derive - --add age --errors > derived.csv

Over many machines, GNU parallel hands out pieces of a file; --header : repeats the header for each:

  parallel --pipe --header : --block 20M --keep-order -S host1,host2 \\
      cosmology-cells derive - --fast --add age --header no < chain.csv > rows.csv

Ends with 0 when done, with 1 when the data were refused, with 2 when the command is wrong or does not
fit the file.
`;
