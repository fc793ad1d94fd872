"""The checks of Debian's python3-jupyter-kernel-test, run on this package's kernel.

Expects JUPYTER_PATH to hold the kernel "cosmology-cells".
"""

import unittest

import jupyter_kernel_test


class CosmologyCells(jupyter_kernel_test.KernelTests):
    kernel_name = "cosmology-cells"
    language_name = "typescript"
    file_extension = ".ts"
    code_hello_world = "console.log('hello, world');"
    code_stderr = "console.error('hello, error');"
    code_generate_error = "throw new RangeError('on purpose');"
    code_execute_result = [
        {"code": "6 * 7", "result": "42"},
        {"code": "await Promise.resolve([1, 2])", "result": "[ 1, 2 ]"},
        {"code": "({ a: 'b' })", "result": "{ a: 'b' }"},
    ]
    code_display_data = [
        {"code": "import { display } from 'tslab'; display.svg('<svg/>');", "mime": "image/svg+xml"},
        {"code": "progress({ label: 'Rows', total: 2 }).finish();", "mime": "text/html"},
    ]
    completion_samples = [
        {"text": "formatNumb", "matches": {"formatNumber"}},
        {"text": "Math.sqr", "matches": {"sqrt", "SQRT1_2", "SQRT2"}},
    ]
    complete_code_samples = ["1 + 1", "function f() { return 1; }", "await Promise.resolve(1);"]
    incomplete_code_samples = ["function f() {", "const a = [1, 2", "Math.max("]
    invalid_code_samples = ["const = 5 5;"]
    code_inspect_sample = "formatNumber"
    code_history_pattern = "6 ?*7"
    supported_history_operations = ("tail", "range", "search")


if __name__ == "__main__":
    unittest.main(verbosity=2)
