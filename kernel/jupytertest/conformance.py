"""The official conformance suite of Jupyter kernels, with every optional test.

Run with the kernelspec "adjoin" where Jupyter finds it. Exit status 1 when a
test fails or is skipped.
"""

import sys
import unittest

import jupyter_kernel_test


class Conformance(jupyter_kernel_test.KernelTests):
    kernel_name = "adjoin"
    language_name = "adjoin"
    file_extension = ".adj"
    code_hello_world = 'say "hello, world"'
    code_stderr = "let trace = 1"
    code_page_something = "explain trace"
    code_clear_output = "clear output"
    code_generate_error = "1/0"
    code_execute_result = [
        {"code": "6*7", "result": "42"},
        {"code": "F_8", "result": "F_8"},
        {"code": "x^4 + x + 1 over F_2", "result": "x^4 + x + 1 over F_2"},
        {"code": "subfields of F_64 as table", "mime": "text/html"},
        {"code": "derivative of x^3 + x", "mime": "text/latex"},
    ]
    code_display_data = [
        {"code": "lattice of F_64/F_2\n1", "mime": "image/svg+xml"},
        {"code": "subfields of F_64 as table\n1", "mime": "text/html"},
    ]
    completion_samples = [
        {"text": "charact", "matches": {"characteristic", "characteristic polynomial"}},
        {"text": "degree of minim", "matches": {"minimal polynomial"}},
    ]
    complete_code_samples = ["6*7", "let f(n) = x^n - 1", "# nothing but words"]
    incomplete_code_samples = ["gcd(", "1 +", "trace of", "[n for n in"]
    invalid_code_samples = [")", "1 2", "let = 3"]
    supported_history_operations = ("tail", "range", "search")
    code_history_pattern = "6?7*"
    code_inspect_sample = "minimal polynomial"


class Welcome(jupyter_kernel_test.IopubWelcomeTests):
    kernel_name = "adjoin"
    support_iopub_welcome = True


if __name__ == "__main__":
    tests = unittest.defaultTestLoader.loadTestsFromModule(sys.modules["__main__"])
    result = unittest.TextTestRunner(verbosity=2).run(tests)
    for test, why in result.skipped:
        print("skipped:", test, why)
    print(f"{result.testsRun} tests, {len(result.skipped)} skipped")
    sys.exit(not result.wasSuccessful() or bool(result.skipped))
