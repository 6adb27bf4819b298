"""JupyterLab and a headless Chromium for the browser tests and the benchmark; both see nothing but this machine."""

import json
import os
import shutil
import signal
import socket
import subprocess
import sys
import time
import urllib.request
from contextlib import contextmanager
from pathlib import Path

ROOT = Path(__file__).parent.parent.parent
CHROMIUM = next((path for name in ("chromium", "chromium-browser", "google-chrome", "chrome")
                 if (path := shutil.which(name))), None)
FLAGS = ["--no-sandbox", "--disable-background-networking", "--disable-component-update", "--disable-sync",
         "--disable-quic", "--no-first-run"]
PANEL = "[...window.jupyterapp.shell.widgets('main')].find(each => each.sessionContext)"
# Cells that are sent before the kernel has told that it listens are never answered.
READY = f"""() => {{
    const kernel = {PANEL}?.sessionContext.session?.kernel;
    return kernel?.connectionStatus === 'connected' && kernel.status === 'idle';
}}"""
RUN_ALL = "window.jupyterapp.commands.execute('notebook:run-all-cells')"  # a promise, kept when all cells have run


@contextmanager
def jupyter_lab(home):
    """Run JupyterLab on a copy of the workbooks, with folders of its own below `home`; give (url, folder)."""
    folder = home / "project"
    shutil.copytree(ROOT / "workbooks", folder / "workbooks")
    (folder / "exports").mkdir()
    settings = home / "settings" / "@jupyterlab" / "apputils-extension"
    settings.mkdir(parents=True)
    (settings / "notification.jupyterlab-settings").write_text(
        json.dumps({"fetchNews": "false", "checkForUpdates": False}))
    with socket.socket() as probe:
        probe.bind(("127.0.0.1", 0))
        port = probe.getsockname()[1]
    environment = {**os.environ, "JUPYTER_CONFIG_DIR": str(home / "config"), "JUPYTER_DATA_DIR": str(home / "data"),
                   "JUPYTER_RUNTIME_DIR": str(home / "runtime"), "JUPYTERLAB_SETTINGS_DIR": str(home / "settings"),
                   "JUPYTERLAB_WORKSPACES_DIR": str(home / "workspaces"), "PYTHONPATH": str(ROOT)}
    environment.pop("CALCLIB_BATCH", None)
    with (home / "lab.log").open("w") as log:
        server = subprocess.Popen(
            [sys.executable, "-m", "jupyterlab", "--no-browser", "--allow-root", f"--port={port}",
             "--ServerApp.token=", "--ServerApp.password=", f"--ServerApp.root_dir={folder}",
             "--LabApp.expose_app_in_browser=True", "--LabApp.news_url=None"],
            cwd=folder, env=environment, stdout=log, stderr=subprocess.STDOUT)
        try:
            url = f"http://127.0.0.1:{port}"
            _await(url + "/api/status", server)
            yield url, folder
        finally:
            server.send_signal(signal.SIGTERM)
            server.wait(20)


def _await(address, server):
    for _ in range(600):
        assert server.poll() is None, "JupyterLab ended; see lab.log"
        try:
            urllib.request.urlopen(address).close()
            return
        except OSError:
            time.sleep(0.1)
    raise TimeoutError("JupyterLab did not answer within a minute")


@contextmanager
def browser():
    """Run the Chromium of this machine."""
    from playwright.sync_api import sync_playwright
    with sync_playwright() as playwright:
        launched = playwright.chromium.launch(executable_path=CHROMIUM, args=FLAGS)
        yield launched
        launched.close()


def open_notebook(page, url, name, run):
    """Open a notebook of the folder `workbooks` in a page; wait until its kernel listens, and run it if asked to."""
    page.goto(f"{url}/lab/tree/workbooks/{name}.ipynb?reset")
    ready(page)
    if run:
        page.evaluate(RUN_ALL)
        page.wait_for_selector(".jp-Notebook .calc-form", state="attached")


def ready(page):
    page.wait_for_selector(".jp-Notebook .jp-Cell", timeout=60000)
    page.wait_for_function("window.jupyterapp !== undefined")
    page.wait_for_function(READY, timeout=60000)
