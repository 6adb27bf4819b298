"""JupyterLab and a headless Chromium for the browser test; both see nothing but this machine."""

import json
import os
import shutil
import signal
import socket
import subprocess
import sys
import time
import urllib.request
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent.parent
CHROMIUM = next((path for name in ("chromium", "chromium-browser", "google-chrome", "chrome")
                 if (path := shutil.which(name))), None)
FLAGS = ["--no-sandbox", "--disable-background-networking", "--disable-component-update", "--disable-sync",
         "--disable-quic", "--no-first-run"]
RUN_ALL = "void window.jupyterapp.commands.execute('notebook:run-all-cells')"
KERNEL = "[...window.jupyterapp.shell.widgets('main')].find(each => each.sessionContext).sessionContext.session?.kernel"
READY = f"() => {{ const kernel = {KERNEL}; return kernel?.connectionStatus === 'connected' && kernel.status === 'idle' }}"

if CHROMIUM is None and os.environ.get("CALCLIB_BROWSER_TESTS") != "required":
    collect_ignore_glob = ["test_*.py"]


def pytest_report_header():
    return f"browser tests with {CHROMIUM}" if CHROMIUM else "browser tests left out: no Chromium on this machine"


def _free_port():
    with socket.socket() as probe:
        probe.bind(("127.0.0.1", 0))
        return probe.getsockname()[1]


@pytest.fixture(scope="session")
def lab(tmp_path_factory):
    """JupyterLab on a copy of the workbooks, with folders of its own; yields (url, folder)."""
    assert CHROMIUM, "CALCLIB_BROWSER_TESTS=required, and there is no Chromium on this machine"
    home = tmp_path_factory.mktemp("lab")
    folder = home / "project"
    shutil.copytree(ROOT / "workbooks", folder / "workbooks")
    (folder / "exports").mkdir()
    settings = home / "settings" / "@jupyterlab" / "apputils-extension"
    settings.mkdir(parents=True)
    (settings / "notification.jupyterlab-settings").write_text(
        json.dumps({"fetchNews": "false", "checkForUpdates": False}))
    port = _free_port()
    environment = {**os.environ, "JUPYTER_CONFIG_DIR": str(home / "config"), "JUPYTER_DATA_DIR": str(home / "data"),
                   "JUPYTER_RUNTIME_DIR": str(home / "runtime"), "JUPYTERLAB_SETTINGS_DIR": str(home / "settings"),
                   "JUPYTERLAB_WORKSPACES_DIR": str(home / "workspaces")}
    environment.pop("CALCLIB_BATCH", None)
    with (home / "lab.log").open("w") as log:
        server = subprocess.Popen(
            [sys.executable, "-m", "jupyterlab", "--no-browser", "--allow-root", f"--port={port}",
             "--ServerApp.token=", "--ServerApp.password=", f"--ServerApp.root_dir={folder}",
             "--LabApp.expose_app_in_browser=True", "--LabApp.news_url=None"],
            env=environment, stdout=log, stderr=subprocess.STDOUT)
        url = f"http://127.0.0.1:{port}"
        for _ in range(300):
            try:
                urllib.request.urlopen(url + "/api/status").close()
                break
            except OSError:
                time.sleep(0.1)
        yield url, folder
        server.send_signal(signal.SIGTERM)
        server.wait(20)


@pytest.fixture(scope="session")
def chromium():
    from playwright.sync_api import sync_playwright
    with sync_playwright() as playwright:
        browser = playwright.chromium.launch(executable_path=CHROMIUM, args=FLAGS)
        yield browser
        browser.close()


@pytest.fixture
def workbook(lab, chromium):
    """Return a function that opens a workbook, runs it and returns the page."""
    url, _ = lab
    pages = []

    def open_workbook(name, run=True):
        page = chromium.new_page(viewport={"width": 1280, "height": 1000})
        page.set_default_timeout(20000)
        page.addresses = []
        page.on("request", lambda request: page.addresses.append(request.url))
        pages.append(page)
        page.goto(f"{url}/lab/tree/workbooks/{name}.ipynb?reset")
        page.wait_for_selector(".jp-Notebook .jp-Cell", timeout=60000)
        page.wait_for_function("window.jupyterapp !== undefined")
        page.wait_for_function(READY, timeout=60000)
        if run:
            page.evaluate(RUN_ALL)
            page.wait_for_selector(".jp-Notebook .calc-form")
        return page

    yield open_workbook
    for page in pages:
        page.close()
