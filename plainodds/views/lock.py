"""The one lock around asking, drawing and showing.

Widget messages arrive on threads of their own while cells run, and matplotlib's caches
of fonts and glyphs belong to everybody: so all views, and all pictures, share it.
"""

from __future__ import annotations

import threading

__all__ = ["LOCK"]

LOCK = threading.RLock()
