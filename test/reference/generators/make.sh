#!/bin/sh
# Remakes the reference: `make.sh` everything, `make.sh calibrated` only what depends on correction.json (the three coefficients of the
# Lyman-alpha correction), `make.sh formulas` only formulas/, `make.sh check` only the comparisons that write nothing.  Debian's python3-mpmath and python3-scipy;
# for formulas/ also colord-data, or its file CIE1931-2deg-XYZ.cmf named in COLOR_MATCHING.
set -e
cd "$(dirname "$0")"
# one core: the linear algebra library's threads only wait for each other on matrices this small
export OMP_NUM_THREADS=1 OPENBLAS_NUM_THREADS=1
python=${REFERENCE_PYTHON:-/usr/bin/python3}
case "${1:-all}" in
  all)
    "$python" models.py
    "$python" check_mpmath.py
    "$python" distances.py
    "$python" recombination.py saha peebles calibrated
    "$python" check_print.py
    "$python" formulas.py ${COLOR_MATCHING:+"$COLOR_MATCHING"}
    ;;
  formulas) "$python" formulas.py ${COLOR_MATCHING:+"$COLOR_MATCHING"} ;;
  calibrated)
    "$python" recombination.py calibrated
    "$python" check_print.py
    "$python" formulas.py ${COLOR_MATCHING:+"$COLOR_MATCHING"}
    ;;
  check) "$python" check_mpmath.py && "$python" check_print.py ;;
  *) echo "make.sh: expected nothing, calibrated, formulas or check; got $1" >&2; exit 2 ;;
esac
