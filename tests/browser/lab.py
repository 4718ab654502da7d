"""A JupyterLab of the tests' own: its own port, folders and settings, and nothing remembered."""

import json
import os
import secrets
import socket
import subprocess
import sys
import time
import urllib.error
import urllib.request
from pathlib import Path
from types import TracebackType
from typing import Literal, Self

__all__ = ["LabServer", "Theme"]

Theme = Literal["light", "dark"]

_THEME_NAMES: dict[Theme, str] = {"light": "JupyterLab Light", "dark": "JupyterLab Dark"}
_SECONDS_TO_START = 120.0


class LabServer:
    """A running `jupyter lab` that serves one empty folder.

    Use it as a context manager; `root` is the folder for notebooks.
    """

    def __init__(self, home: Path) -> None:
        self._home = home
        self.root = home / "notebooks"
        self._settings = home / "settings"
        self._log = home / "lab.log"
        self._token = secrets.token_hex(16)
        self._port = 0
        self._process: subprocess.Popen[bytes] | None = None

    def __enter__(self) -> Self:
        self.root.mkdir(parents=True)
        self._set("notification", {"fetchNews": "false", "checkForUpdates": False})
        self.use_theme("light")
        self._port = _free_port()
        with self._log.open("wb") as log:
            self._process = subprocess.Popen(
                [sys.executable, "-m", "jupyterlab", *self._options()],
                cwd=self.root,
                env=self._environment(),
                stdin=subprocess.DEVNULL,
                stdout=log,
                stderr=subprocess.STDOUT,
            )
        try:
            self._wait_until_it_answers()
        except BaseException:
            self._stop()
            raise
        return self

    def __exit__(
        self,
        kind: type[BaseException] | None,
        error: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        self._stop()

    def url(self, notebook: str) -> str:
        """Address that opens a notebook of `root` in a workspace that nobody has used."""
        workspace = secrets.token_hex(4)
        return (
            f"http://127.0.0.1:{self._port}/lab/workspaces/{workspace}/tree/{notebook}"
            f"?reset&token={self._token}"
        )

    def use_theme(self, theme: Theme) -> None:
        """What pages opened from now on look like."""
        self._set("themes", {"theme": _THEME_NAMES[theme], "adaptive-theme": False})

    def stop_kernels(self) -> None:
        """End the kernels that closed pages have left running."""
        for kernel in json.loads(self._call("GET", "/api/kernels")):
            self._call("DELETE", f"/api/kernels/{kernel['id']}")

    def _options(self) -> list[str]:
        return [
            "--no-browser",
            f"--port={self._port}",
            "--ServerApp.ip=127.0.0.1",
            "--ServerApp.port_retries=0",
            "--ServerApp.open_browser=False",
            f"--ServerApp.root_dir={self.root}",
            f"--IdentityProvider.token={self._token}",
            "--LabApp.news_url=",
            "--LabApp.check_for_updates_class=jupyterlab.NeverCheckForUpdate",
            *(["--allow-root"] if hasattr(os, "geteuid") and os.geteuid() == 0 else []),
        ]

    def _environment(self) -> dict[str, str]:
        kept = {
            name: held
            for name, held in os.environ.items()
            if not name.startswith(("JUPYTER", "IPYTHON", "MPL"))
        }
        own = {
            "JUPYTER_CONFIG_DIR": self._home / "config",
            "JUPYTER_DATA_DIR": self._home / "data",
            "JUPYTER_RUNTIME_DIR": self._home / "runtime",
            "JUPYTERLAB_SETTINGS_DIR": self._settings,
            "JUPYTERLAB_WORKSPACES_DIR": self._home / "workspaces",
            "IPYTHONDIR": self._home / "ipython",
            # tests may look at what a notebook has saved, so its figures are those of any machine
            "MPLCONFIGDIR": self._home / "matplotlib",
        }
        return {**kept, **{name: str(folder) for name, folder in own.items()}}

    def _set(self, plugin: str, settings: dict[str, object]) -> None:
        folder = self._settings / "@jupyterlab" / "apputils-extension"
        folder.mkdir(parents=True, exist_ok=True)
        (folder / f"{plugin}.jupyterlab-settings").write_text(json.dumps(settings))

    def _call(self, method: str, path: str) -> str:
        request = urllib.request.Request(
            f"http://127.0.0.1:{self._port}{path}",
            method=method,
            headers={"Authorization": f"token {self._token}"},
        )
        # the server is on this machine: no proxy stands between
        opener = urllib.request.build_opener(urllib.request.ProxyHandler({}))
        with opener.open(request, timeout=30) as response:
            return str(response.read(), "utf-8")

    def _wait_until_it_answers(self) -> None:
        assert self._process is not None
        last = time.monotonic() + _SECONDS_TO_START
        while time.monotonic() < last:
            if self._process.poll() is not None:
                break
            try:
                self._call("GET", "/api/status")
            except (urllib.error.URLError, OSError):
                time.sleep(0.1)
            else:
                return
        raise RuntimeError(f"JupyterLab did not start:\n{self._log.read_text()[-3000:]}")

    def _stop(self) -> None:
        if self._process is None or self._process.poll() is not None:
            return
        self._process.terminate()
        try:
            self._process.wait(timeout=20)
        except subprocess.TimeoutExpired:
            self._process.kill()
            self._process.wait()


def _free_port() -> int:
    with socket.socket() as probe:
        probe.bind(("127.0.0.1", 0))
        return int(probe.getsockname()[1])
