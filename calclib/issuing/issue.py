"""Issue a calc: run its workbook in a clean kernel, export, and write one folder per revision, whole or not at all."""

import json
import os
import shutil
import sys
import tempfile
from importlib.metadata import version
from pathlib import Path

from jupyter_client.manager import AsyncKernelManager
from jupyter_core.utils import run_sync

import calclib
from calclib import case as cases
from calclib.bundles import CALC
from calclib.calc import evaluate
from calclib.errors import CalcError

# What a workbook imports, so that the kernel has it by the time this process is ready.
_PRELOAD = ["--IPKernelApp.exec_lines=import calclib.workbook, calclib.typeset, calclib.explore.sensitivity"]
# The running kernel is emptied and moved to the folder of the calc before each workbook.
_CLEAN = "get_ipython().reset(new_session=True)\nimport os as _os\n_os.environ['CALCLIB_BATCH'] = '1'\n_os.chdir({!r})"

# What decides the bytes of an issued calc beside calclib itself; .ci/versions.txt pins the same for the demo calcs.
_DECIDES = ("contourpy", "fonttools", "handcalcs", "matplotlib", "numpy", "pillow", "pint", "pypandoc_binary", "typst")

LEFT_BY_SYSTEMS = {".DS_Store", "Thumbs.db", "desktop.ini"}   # what a file browser leaves in a folder
_SWEPT = ".swept"

QUIET = ["--log-level=ERROR"]  # the kernel otherwise warns of plain TCP, which never leaves this machine here


def workbook_of(kind):
    """Return the path of the workbook of a kind: beside the package in a checkout, inside it when installed."""
    package = Path(calclib.__file__).parent
    for folder in (package.parent / "workbooks", package / "_workbooks"):
        path = folder / f"{kind.name}.ipynb"
        if path.exists():
            return path
    raise CalcError(f"no workbook {kind.name}.ipynb beside calclib; reinstall calclib.")


def made_with():
    """Return the versions that decide the bytes of an issued calc: name -> version."""
    return {"calclib": calclib.__version__, **{name: version(name) for name in _DECIDES}}


def _environment(home):
    """Return the environment of the kernel: the same calclib as here, and nothing of this user's settings."""
    kept = {name: value for name, value in os.environ.items()
            if name not in ("PYTHONSTARTUP", "MATPLOTLIBRC", "JPY_SESSION_NAME")}
    package = str(Path(calclib.__file__).parent.parent)
    return {**kept, "IPYTHONDIR": home, "CALCLIB_BATCH": "1",
            "PYTHONPATH": os.pathsep.join(filter(None, (package, os.environ.get("PYTHONPATH"))))}


class Issuer:
    """Issues calcs; the kernel is started for the first and serves the others of the same run.

    Use it as a context manager, so that the kernel is ended.
    """

    def __init__(self):
        self._kernel = self._client = self._home = None

    def __enter__(self):
        return self

    def __exit__(self, *_):
        if self._client is not None:
            self._client.kc.stop_channels()
        if self._kernel is not None:
            run_sync(self._kernel.shutdown_kernel)(now=True)
        if self._home is not None:
            self._home.cleanup()

    def _start(self):
        """Start the kernel. It gets going by itself while this process imports what it needs, which takes as long.

        It gets an empty folder, since Python imports from the folder that it is in, and whoever checks a calc stands in
        a folder of a stranger's files; and no start-up file of this user, which could change what the workbook prints.
        """
        if self._kernel is None:
            self._home = tempfile.TemporaryDirectory(prefix="calc-kernel-", ignore_cleanup_errors=True)
            self._kernel = AsyncKernelManager(kernel_name="python3")
            run_sync(self._kernel.start_kernel)(extra_arguments=[*QUIET, *_PRELOAD], cwd=self._home.name,
                                                env=_environment(self._home.name))

    def build(self, case):
        """Return {file name: bytes} of an issued calc: PDF, HTML, executed notebook, record, case."""
        calc = evaluate(case)
        self._start()
        _import_nbformat()
        from calclib.issuing import pages
        from calclib.issuing.html import write_html
        from calclib.issuing.pdf import write_pdf
        name = f"{calc.x.calc_number}-rev-{calc.x.revision}"
        content = case.yaml()
        stored = pages.serialised(self._run(case.kind, f"{name}.yaml", content))
        # From the notebook as it is stored, so that nbconvert makes the same bytes of it.
        document, case_text, record = pages.document_of(json.loads(stored))
        if case_text != content:
            raise CalcError(f"{name}: the workbook changed the case while it ran; nothing was issued.")
        files = {
            f"{name}.yaml": content.encode(),
            f"{name}.json": (json.dumps(record, indent=1, ensure_ascii=False) + "\n").encode(),
            f"{name}.ipynb": stored,
        }
        attachments = pages.attachments(files)
        files[f"{name}.html"] = write_html(document, attachments).encode()
        files[f"{name}.pdf"] = write_pdf(document, attachments)
        return files

    def issue(self, case_path, to):
        """Write the revision's folder below `to` and return the paths of its files.

        Issued again with the same inputs, date and version nothing changes and the paths are returned.

        Raises
        ------
        CalcError : the case cannot be used, the revision is issued already with other content, or nothing can be
            written.
        """
        case = cases.load(case_path)
        files = self.build(case)
        calc = evaluate(case)
        folder = Path(to) / calc.x.calc_number / f"rev-{calc.x.revision}"
        try:
            _sweep(folder)
            if folder.exists():
                _refuse_if_different(folder, files)
            else:
                _write_folder(folder, files)
        except OSError as error:
            raise CalcError(f"{folder}: cannot be written: {error.strerror or error}. Nothing was issued.") from error
        order = (".pdf", ".html", ".ipynb", ".json", ".yaml")
        return [folder / name for name in sorted(files, key=lambda n: order.index(Path(n).suffix))]

    def _run(self, kind, case_name, content):
        import nbformat
        notebook = nbformat.read(workbook_of(kind), as_version=4)
        _set_case(notebook, case_name)
        with tempfile.TemporaryDirectory(prefix="calc-") as folder:
            (Path(folder) / case_name).write_text(content, encoding="utf-8", newline="\n")
            self._execute(nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell(_CLEAN.format(folder))]))
            self._execute(notebook)
            self._execute(nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell(
                _CLEAN.format(tempfile.gettempdir()))]))  # Windows removes no folder that a process is in
        notebook = _as_issued(notebook)
        notebook.metadata["calclib"] = made_with()
        return notebook

    def _execute(self, notebook):
        from nbclient import NotebookClient
        from nbclient.exceptions import CellExecutionError, CellTimeoutError, DeadKernelError
        if self._client is None:
            self._client = NotebookClient(notebook, km=self._kernel, record_timing=False, timeout=120)
        self._client.nb = notebook
        self._client.reset_execution_trackers()
        with self._client.setup_kernel(cleanup_kc=False):
            for index, cell in enumerate(notebook.cells):
                try:
                    self._client.execute_cell(cell, index)
                except CellExecutionError as error:
                    raise CalcError(f"the workbook stopped in cell {index + 1} with {error.ename}: {error.evalue}. "
                                    "Nothing was issued.") from error
                except (CellTimeoutError, DeadKernelError) as error:
                    raise CalcError(f"the workbook gave no answer in cell {index + 1}. Nothing was issued.") from error


def _import_nbformat():
    """Import nbformat without the grammar of web addresses, which takes seconds to build and which no notebook needs.

    jsonschema offers the check where rfc3987_syntax is installed, as JupyterLab does, and does without where it is not.
    """
    if "nbformat" not in sys.modules and "rfc3987_syntax" not in sys.modules:
        sys.modules["rfc3987_syntax"] = None
        try:
            import nbformat  # noqa: F401
        finally:
            del sys.modules["rfc3987_syntax"]


def _set_case(notebook, case_name):
    """Put the case into a cell behind the parameters, by the convention of papermill."""
    import nbformat
    place = next(i for i, cell in enumerate(notebook.cells) if "parameters" in cell.metadata.get("tags", []))
    cell = nbformat.v4.new_code_cell(f"# Parameters of this run\ncase = {json.dumps(case_name, ensure_ascii=False)}\n")
    cell.id = "injected-parameters"
    cell.metadata["tags"] = ["injected-parameters", "hide-input"]
    notebook.cells.insert(place + 1, cell)


def _as_issued(notebook):
    """Remove what differs from run to run: counters, kernel details, widget state."""
    count = 0
    for cell in notebook.cells:
        if cell.cell_type == "code":
            count += 1
            cell.execution_count = count
            for output in cell.outputs:
                if "execution_count" in output:
                    output["execution_count"] = count
    notebook.metadata = {"kernelspec": notebook.metadata["kernelspec"], "language_info": {"name": "python"}}
    if not any(CALC in output.get("data", {}) for cell in notebook.cells for output in cell.get("outputs", [])):
        raise CalcError("the workbook ran without storing a calc; its last cell must be book.close().")
    return notebook


def _refuse_if_different(folder, files):
    present = {path.name: path.read_bytes() if path.is_file() else None for path in folder.iterdir()
               if path.name not in LEFT_BY_SYSTEMS}
    if present != files:
        raise CalcError(f"{folder}: this revision is issued already, with other content. An issued revision is never "
                        "overwritten: raise the revision in the case, or issue to another folder.")


def _staging(folder):
    """Return how the name of a folder begins that is being written."""
    return f".{folder.name}-"


def _sweep(folder):
    """Remove what a killed process left beside `folder`.

    Each is renamed first: a process that is still writing there then fails as a whole, and never puts a folder in place
    that is half swept.
    """
    if folder.parent.is_dir():
        for left in [path for path in folder.parent.iterdir() if path.name.startswith(_staging(folder))]:
            swept = left.with_name(f"{_SWEPT}{left.name}")
            os.rename(left, swept)
        for swept in [path for path in folder.parent.iterdir() if path.name.startswith(_SWEPT)]:
            shutil.rmtree(swept)


def _write_folder(folder, files):
    folder.parent.mkdir(parents=True, exist_ok=True)
    staging = Path(tempfile.mkdtemp(prefix=_staging(folder), dir=folder.parent))
    try:
        for name, content in files.items():
            cases.write_whole(staging / name, content)
        os.chmod(staging, 0o755)
        os.rename(staging, folder)
    except BaseException:
        shutil.rmtree(staging, ignore_errors=True)
        raise
