"""The exporters as nbconvert knows them: ``jupyter nbconvert --to calc-pdf`` and ``--to calc-html``."""

from nbconvert.exporters import Exporter
from traitlets import default

from calclib.issuing import pages
from calclib.issuing.html import write_html
from calclib.issuing.pdf import write_pdf


class _CalcExporter(Exporter):
    """Lay out the calc of an executed notebook, with the case, the record and the notebook attached."""

    def from_notebook_node(self, nb, resources=None, **kw):
        """Return (output, resources). Raises CalcError for a notebook without a calc or with a failed cell."""
        output = self._write(*pages.exported(nb))
        _, resources = super().from_notebook_node(nb, resources, **kw)
        return output, resources


class CalcPDFExporter(_CalcExporter):
    """An executed workbook -> PDF/A."""

    export_from_notebook = "Calc as PDF"
    output_mimetype = "application/pdf"
    _write = staticmethod(write_pdf)

    @default("file_extension")
    def _file_extension_default(self):
        return ".pdf"


class CalcHTMLExporter(_CalcExporter):
    """An executed workbook -> one HTML page."""

    export_from_notebook = "Calc as HTML"
    output_mimetype = "text/html"
    _write = staticmethod(write_html)

    @default("file_extension")
    def _file_extension_default(self):
        return ".html"
