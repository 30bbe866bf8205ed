"""The public conformance suite (jupyter_kernel_test) on the kernel called lagbook."""

import unittest

import jupyter_kernel_test


class LagbookConformance(jupyter_kernel_test.KernelTests):
    kernel_name = "lagbook"
    language_name = "typescript"
    file_extension = ".ts"
    code_hello_world = "console.log('hello, world')"
    code_stderr = "console.error('wrong')"
    completion_samples = [
        {"text": "Math.sq", "matches": ["SQRT1_2", "SQRT2", "sqrt"]},
        {"text": "seaso", "matches": ["seasonal"]},
    ]
    complete_code_samples = [
        "1",
        "const a = 1\na",
        "function half(x: number) {\n  return x / 2\n}",
        "await load('weeks.csv', { time: 'week' })",
    ]
    incomplete_code_samples = ["function half(x: number) {", "const a = [1,", "/* open", "fit(weeks, 'riders', ["]
    invalid_code_samples = ["const = 3", "let let a b", "1 +* 2 "]
    code_generate_error = "throw new RangeError('too far')"
    code_execute_result = [
        {"code": "6*7", "result": "42"},
        {"code": "const six: number = 6\nsix", "result": "6"},
        {"code": "Promise.resolve('later')", "result": "'later'"},
    ]
    code_display_data = [
        {
            "code": "await display({ [Symbol.for('Jupyter.display')]: () => ({ 'text/html': '<b>bold</b>' }) })",
            "mime": "text/html",
        }
    ]
    supported_history_operations = ("tail", "range", "search")
    code_history_pattern = "6?7"
    code_inspect_sample = "lag"
    code_clear_output = "clearOutput()"


if __name__ == "__main__":
    unittest.main()
