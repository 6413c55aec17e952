"""Opens notebooks in JupyterLab in a headless browser, runs them and looks.

usage: browser.py CHROMIUM PORT TOKEN OUT NOTEBOOK...

The server is already there. Each notebook is opened alone, all its cells are
run again, and the page must then hold no error, at least one table and at
least one figure. A picture of the whole notebook goes to the folder OUT.
"""

import pathlib
import sys

from playwright.sync_api import TimeoutError, sync_playwright

ARGS = [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
]

PROMPTS = "() => [...document.querySelectorAll('.jp-CodeCell .jp-InputPrompt')].map(e => e.textContent)"


def main(chromium, port, token, out, notebooks):
    failed = False
    with sync_playwright() as p:
        browser = p.chromium.launch(executable_path=chromium, args=ARGS)
        for notebook in notebooks:
            page = browser.new_context(viewport={"width": 1100, "height": 1000}).new_page()
            page.goto(f"http://127.0.0.1:{port}/lab/tree/{notebook}?token={token}&reset", timeout=90_000)
            page.wait_for_selector(".jp-Notebook .jp-CodeCell", timeout=90_000)
            # Until the kernel is there, running a cell asks which one to start.
            page.locator("#jp-main-statusbar", has_text="Adjoin | Idle").wait_for(timeout=90_000)
            page.keyboard.press("Control+b")  # without the list of files
            page.click(".jp-Notebook .jp-Cell >> nth=0")
            page.get_by_role("menuitem", name="Run", exact=True).click()
            page.get_by_role("menuitem", name="Run All Cells", exact=True).click()
            try:
                page.wait_for_function(f"() => ({PROMPTS})().every(s => /\\d/.test(s))", timeout=60_000)
            except TimeoutError:
                print(f"{notebook}: not all cells ran:", page.evaluate(PROMPTS))
                page.screenshot(path=str(pathlib.Path(out) / "failed.png"))
                raise
            # Make the window as tall as the notebook, so that one picture holds it.
            height = page.evaluate("() => document.querySelector('.jp-WindowedPanel-viewport').scrollHeight")
            page.set_viewport_size({"width": 1100, "height": min(int(height) + 200, 12_000)})
            page.evaluate("() => document.querySelectorAll('.jp-WindowedPanel-outer').forEach(e => e.scrollTop = 0)")
            page.wait_for_timeout(1500)
            errors = page.locator(".jp-OutputArea-output[data-mime-type='application/vnd.jupyter.error']").count()
            tables = page.locator(".jp-OutputArea-output table").count()
            figures = page.locator(".jp-OutputArea-output figure img").count()
            name = pathlib.Path(notebook).stem
            page.screenshot(path=str(pathlib.Path(out) / f"{name}.png"))
            print(f"{notebook}: {errors} errors, {tables} tables, {figures} figures")
            failed = failed or errors > 0 or tables == 0 or figures == 0
            page.context.close()
        browser.close()
    return failed


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:5], sys.argv[5:]))
