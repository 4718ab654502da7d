"""Notebooks made on the spot for JupyterLab to open."""

import secrets
from pathlib import Path

import nbformat

from tests.browser.lab import LabServer

__all__ = ["put_notebook"]


def put_notebook(lab: LabServer, *cells: str) -> Path:
    """Write code cells as a notebook into a new folder of the server's root."""
    notebook = nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell(each) for each in cells])
    notebook.metadata["kernelspec"] = {
        "name": "python3",
        "display_name": "Python 3",
        "language": "python",
    }
    folder = lab.root / secrets.token_hex(4)
    folder.mkdir()
    path = folder / "page.ipynb"
    nbformat.write(notebook, path)
    return path
