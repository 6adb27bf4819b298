"""The issued demo calcs in exports/ are, byte for byte, what the issue command makes of the demo cases."""

from pathlib import Path

import pytest

from calclib import case
from calclib.issuing.issue import Issuer

ROOT = Path(__file__).parent.parent.parent
DEMOS = sorted((ROOT / "workbooks" / "cases").glob("*.yaml"))


@pytest.fixture(scope="module")
def issuer():
    with Issuer() as started:
        yield started


@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
def test_the_issued_demo_is_what_its_case_makes(issuer, path):
    demo = case.load(path)
    folder = ROOT / "exports" / demo.texts["calc_number"] / f"rev-{demo.texts['revision']}"
    assert {file.name: file.read_bytes() for file in folder.iterdir()} == issuer.build(demo)
