"""What all tests share."""

import hypothesis
import pytest

from calclib.equations import form

hypothesis.settings.register_profile("calclib", deadline=None)   # the first example pays for imports
hypothesis.settings.load_profile("calclib")


def pytest_configure(config):
    config.addinivalue_line("markers", "published(source, equations): compares equations with printed numbers")


@pytest.fixture(autouse=True)
def claimed_equations_are_called(request, monkeypatch):
    """A test marked as published must call every equation that it claims to compare."""
    marker = request.node.get_closest_marker("published")
    if marker is None:
        yield
        return
    called, call = set(), form.Equation.__call__

    def noted(self, **values):
        called.add(self)
        return call(self, **values)

    monkeypatch.setattr(form.Equation, "__call__", noted)
    yield
    left = [equation.name for equation in marker.kwargs["equations"] if equation not in called]
    assert not left, f"claimed to be compared with {marker.kwargs['source']}, never called: {left}"


@pytest.fixture
def register():
    """The register of equations, put back as it was: for tests that define equations of their own."""
    before = list(form.REGISTER)
    yield form.REGISTER
    form.REGISTER[:] = before
