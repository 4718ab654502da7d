"""A front end made of nothing: it records what views send, and sends what people do."""

import re
import threading
from uuid import uuid4

__all__ = ["FakeComm", "FrontEnd", "control_of", "text_of"]


class FakeComm:
    """One widget's line to the front end."""

    def __init__(self, line, comm_id=None, data=None, **_):
        self.comm_id = comm_id or uuid4().hex
        self.kernel = "a kernel"
        self._line = line

    def send(self, data=None, metadata=None, buffers=None):
        self._line.append((self.comm_id, data))

    def on_msg(self, callback):
        self.callback = callback

    def on_close(self, callback):
        pass

    def close(self, *args, **kwargs):
        pass


class FrontEnd:
    """Every message that widgets have sent, in order."""

    def __init__(self):
        self.sent = []
        self._lock = threading.Lock()

    def create_comm(self, **options):
        return FakeComm(self, **options)

    def append(self, message):
        with self._lock:
            self.sent.append(message)

    def forget(self):
        self.sent.clear()

    def change(self, widget, **state):
        """What a person does to a widget arrives as one message."""
        data = {"method": "update", "state": state, "buffer_paths": []}
        widget.comm.callback({"content": {"data": data}, "buffers": []})

    def press(self, button):
        """Press a button."""
        data = {"method": "custom", "content": {"event": "click"}}
        button.comm.callback({"content": {"data": data}, "buffers": []})

    def updates(self, widget, name="value"):
        """The values that a widget has been told to show."""
        return [
            data["state"][name]
            for comm_id, data in self.sent
            if comm_id == widget.comm.comm_id
            and data["method"] == "update"
            and name in data["state"]
        ]


def text_of(markup):
    """What a person reads of markup."""
    return re.sub(r"<[^>]+>", "", markup)


def control_of(view, field):
    """The control that edits a field."""
    return next(
        binding.control
        for binding in view._bindings.values()
        if f"plainodds-control-{field}" in binding.control.widget._dom_classes
    )
