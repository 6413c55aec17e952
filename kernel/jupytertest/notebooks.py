"""Runs notebooks as Jupyter's own tools do, and compares their outputs.

usage: notebooks.py OUT NOTEBOOK...

Each notebook is executed by nbclient in a fresh kernel; the outputs must be
those that the file holds. The executed notebook is then exported to HTML by
nbconvert into the folder OUT.
"""

import copy
import difflib
import json
import pathlib
import sys

import nbclient
import nbconvert
import nbformat


def outputs(notebook):
    """The outputs of all cells, without what may differ from run to run."""
    cells = []
    for cell in notebook.cells:
        if cell.cell_type != "code":
            continue
        kept = []
        for output in cell.outputs:
            output = copy.deepcopy(output)
            output.pop("execution_count", None)
            kept.append(output)
        cells.append(kept)
    return cells


def text(cell):
    """The outputs of a cell as lines, for a diff."""
    return [line for output in cell for line in json.dumps(output, indent=1, sort_keys=True).splitlines()]


def main(out, paths):
    failed = False
    for path in map(pathlib.Path, paths):
        stored = nbformat.read(path, as_version=4)
        nbformat.validate(stored)
        fresh = copy.deepcopy(stored)
        for cell in fresh.cells:
            if cell.cell_type == "code":
                cell.outputs, cell.execution_count = [], None
        nbclient.NotebookClient(fresh, kernel_name="adjoin", timeout=120, record_timing=False).execute()
        for number, (want, got) in enumerate(zip(outputs(stored), outputs(fresh)), 1):
            if want != got:
                failed = True
                print(f"{path.name}: the outputs of code cell {number} differ")
                for line in difflib.unified_diff(text(want), text(got), "stored", "fresh", n=0, lineterm=""):
                    print("   ", line[:200])
        html, _ = nbconvert.HTMLExporter().from_notebook_node(fresh)
        if "<table" not in html or "data:image/svg+xml" not in html:
            failed = True
            print(f"{path.name}: the HTML has no table or no figure")
        page = pathlib.Path(out) / (path.stem + ".html")
        page.write_text(html, encoding="utf-8")
        print(f"{path.name}: {len(fresh.cells)} cells, {len(html)} bytes of HTML")
    return failed


if __name__ == "__main__":
    sys.exit(main(sys.argv[1], sys.argv[2:]))
