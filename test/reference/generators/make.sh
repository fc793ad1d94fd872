#!/bin/sh
# Remakes the reference: `make.sh` everything, `make.sh calibrated` only what depends on correction.json (the three coefficients of the
# Lyman-alpha correction), `make.sh formulas [CMF]` only formulas/ (CMF: the color-matching file of Debian's colord-data, where it
# is not installed), `make.sh check` only the comparisons that write nothing.  Debian's python3-mpmath and python3-scipy.
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
    "$python" formulas.py
    ;;
  formulas) "$python" formulas.py ${2:+"$2"} ;;
  calibrated) "$python" recombination.py calibrated && "$python" check_print.py ;;
  check) "$python" check_mpmath.py && "$python" check_print.py ;;
  *) echo "make.sh: expected nothing, calibrated, formulas or check; got $1" >&2; exit 2 ;;
esac
