"""What the browser tests share: one JupyterLab, one Chromium, and pages whose every request is written down."""

import os
from urllib.parse import urlparse

import pytest
from lab import CHROMIUM, browser, jupyter_lab, open_notebook

if CHROMIUM is None and os.environ.get("CALCLIB_BROWSER_TESTS") != "required":
    collect_ignore_glob = ["test_*.py"]


def pytest_report_header():
    return f"browser tests with {CHROMIUM}" if CHROMIUM else "browser tests left out: no Chromium on this machine"


@pytest.fixture(scope="session")
def lab(tmp_path_factory):
    """JupyterLab on a copy of the workbooks: (url, folder)."""
    assert CHROMIUM, "CALCLIB_BROWSER_TESTS=required, and there is no Chromium on this machine"
    with jupyter_lab(tmp_path_factory.mktemp("lab")) as running:
        yield running


@pytest.fixture(scope="session")
def context(lab):
    """A browser of which every request goes to this machine."""
    with browser() as chromium:
        made = chromium.new_context(viewport={"width": 1280, "height": 1000})
        made.set_default_timeout(30000)
        addresses = []
        made.on("request", lambda request: addresses.append(request.url))
        made.on("page", lambda page: page.on("websocket", lambda socket: addresses.append(socket.url)))
        yield made
        made.close()
        hosts = {urlparse(address).hostname for address in addresses if not address.startswith(("data:", "blob:"))}
        assert hosts == {"127.0.0.1"}


@pytest.fixture
def workbook(lab, context):
    """Return a function that opens a workbook, runs it if asked to and returns the page."""
    pages = []

    def opened(name, run=True):
        page = context.new_page()
        pages.append(page)
        page.on("dialog", lambda dialog: dialog.accept())  # "leave this page?"
        open_notebook(page, lab[0], name, run)
        return page

    yield opened
    for page in pages:
        page.close()
