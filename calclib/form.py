"""The input form inside a workbook: labelled text fields, and a judge who says what each text means and what is wrong.

The form holds texts exactly as typed and decides nothing. The judge reads them, recomputes what hangs on them and
answers with messages, echoes and the stamps of the figures that belong to these inputs. Every output made from the
inputs prints `stamp <hex digits>`; the page greys out, and overprints STALE, each output whose stamp the judge does not
vouch for.
"""

import re
import threading
import traceback
from importlib.resources import files
from pathlib import PurePath

import anywidget
import traitlets
from IPython.display import display

from calclib.errors import CalcError, nearest

PACKAGE = files("calclib")
FIELD_KEYS = {"name", "label", "symbol", "unit", "group", "help", "choices", "search", "example", "optional", "slider",
              "blank"}
ANSWER_KEYS = {"ok", "messages", "echo", "stamp", "status"}
STAMP = re.compile(r"[0-9a-f]{8,64}( [0-9a-f]{8,64})*")
SILENT = {"ok": True, "text": "", "earlier": False}  # what the buttons have to say before one is pressed

# Stands below the form in the stored notebook; form.css hides it as long as a running form stands above it.
NOT_RUNNING = (
    "If no form stands above, or it does not answer, the workbook is not running: choose *Run > Run All Cells*. "
    "The figures below are the stored ones; each names the inputs it was made from."
)


class Form(anywidget.AnyWidget):
    """A form as one widget.

    Parameters
    ----------
    fields : list of dicts, one a field, in tab order. Needed: "name" and "label". Optional: "symbol" ("d_h", shown with
        a subscript), "unit" (a hint: "in or mm"), "group" (heading), "help" (one sentence), "choices" (list of texts),
        "search" (True: a long list, searched by typing), "example" ("13/16 in"), "optional" (True), "blank" (what
        stands for an empty entry: "letter, by default"). "slider" is for the plots; the form passes over it.
    texts : dict, name -> text as typed; a field without one starts empty.
    judge : called as `judge(name, text, texts)` after every change, and once as `judge(None, None, texts)` when the
        form is made. Returns a dict: "ok" (bool), and optionally "messages" (name -> what is wrong), "echo" (name ->
        the value as read), "status" (one line) and "stamp" (8 to 64 hex digits, several apart by spaces). Without a
        stamp no figure belongs to these texts, and every stamped output is shown as stale. The judge may set `fields`
        where a unit or a default changes; names, labels and order stay. `in_view` tells it the stamps of the outputs
        that the reader has before the eyes.
    on_save, on_issue : called without arguments by the buttons; the text they return is shown. Without a function
        there is no button.
    on_painted : called with the number of a message {"drawn": number} once the page has painted what came before it.

    Set `complete` when the last output stands: the page then brings the form into view, once.

    Widget messages arrive on a second thread, so everything that calls the judge holds `form.lock`, an RLock. Code
    outside the form that redraws the same outputs holds it too.

    Raises ValueError for fields or texts that do not fit together.
    """

    _esm = PACKAGE.joinpath("form.js").read_text(encoding="utf-8")
    _css = PACKAGE.joinpath("form.css").read_text(encoding="utf-8")
    fields = traitlets.List().tag(sync=True)
    buttons = traitlets.List().tag(sync=True)
    texts = traitlets.Dict().tag(sync=True)
    reply = traitlets.Dict().tag(sync=True)
    complete = traitlets.Bool(False).tag(sync=True)

    def __init__(self, fields, texts, judge, on_save=None, on_issue=None, on_painted=None):
        names = _checked_fields(fields)
        for name in texts:
            if name not in names:
                raise ValueError(f"text for an unknown field {name!r}{nearest(name, names)}")
            if not isinstance(texts[name], str):
                raise ValueError(f"{name}: a field holds text, not {texts[name]!r}")
        self.lock = threading.RLock()
        self._judge = judge
        self._on_painted = on_painted
        self.in_view = []
        self._actions = {"save": on_save, "issue": on_issue}
        self._pressed_with = None  # the texts when a button was pressed last
        super().__init__(
            fields=[dict(field) for field in fields],
            buttons=[name for name, action in self._actions.items() if action is not None],
            texts={name: texts.get(name, "") for name in names},
        )
        self.on_msg(self._receive)
        with self.lock:
            self._answer(None, None, dict(self.texts), "")

    def set_text(self, name, text):
        """Change one text as a user would by typing it, and return the reply."""
        with self.lock:
            self._edit(name, text, "")
            return self.reply

    def press(self, button):
        """Do what the button "save" or "issue" does, and return the reply; its "notice" is what is shown."""
        with self.lock:
            self._press(button, "")
            return self.reply

    def fail(self, error):
        """Show an exception of work that was done for the form elsewhere; no figure is vouched for any more."""
        with self.lock:
            self.reply = {**self.reply, **_failed(error)}

    def _receive(self, _widget, content, _buffers):
        """Handle a message of the page: {"painted": number}, or what was typed and pressed.

        The latter is {"id", "edits": [[name, text], ...], "press": button or None, "in_view": stamps}; no edits and no
        button is the page asking whether anybody is there.
        """
        if "painted" in content:
            self._on_painted(content["painted"])
            return
        with self.lock:
            self.in_view = content["in_view"]
            message_id = content["id"]
            try:
                steps = [(self._edit, name, text) for name, text in content["edits"]]
                if content["press"]:
                    steps.append((self._press, content["press"]))
                for number, (step, *what) in enumerate(steps, 1):
                    # Only the last step answers the message: the page then knows that all of it has been heard.
                    step(*what, message_id if number == len(steps) else "")
            except Exception as error:  # ipywidgets would only log it, and the user would see nothing
                self.reply = {**self.reply, **_failed(error), "busy": "", "id": message_id}
            if self.reply["id"] != message_id:
                self.reply = {**self.reply, "id": message_id}

    def _edit(self, name, text, message_id):
        if name not in self.texts:
            raise ValueError(f"unknown field {name!r}{nearest(name, self.texts)}")
        if not isinstance(text, str):
            raise ValueError(f"{name}: a field holds text, not {text!r}")
        self._answer(name, text, {**self.texts, name: text}, message_id)

    def _answer(self, name, text, texts, message_id):
        """Keep the texts, ask the judge, publish texts and answer in one message."""
        with self.hold_sync():
            self.texts = texts
            try:
                answer = {**_checked_answer(self._judge(name, text, dict(texts)), texts), "error": ""}
            except Exception as error:  # whatever went wrong has to show in the form
                answer = _failed(error)
            # What a button said stays on screen, but "saved" must not seem to speak of a later text.
            notice = {**self.reply.get("notice", SILENT), "earlier": texts != self._pressed_with}
            self.reply = {**answer, "busy": "", "notice": notice, "id": message_id}

    def _press(self, button, message_id):
        action = self._actions.get(button)
        if action is None:
            raise ValueError(f"the form has no button {button!r}")
        # Said before the work starts, so that the page does not take a long issue for a dead kernel.
        self.reply = {**self.reply, "busy": button, "notice": SILENT, "id": message_id}
        self._pressed_with = self.texts
        try:
            said = action()
            if not isinstance(said, str):
                raise TypeError(f'the work behind "{button}" must end with a text to show, not {said!r}')
            notice = {"ok": True, "text": said, "earlier": False}
        except Exception as error:
            notice = {"ok": False, "text": _told(error), "earlier": False}
        self.reply = {**self.reply, "busy": "", "notice": notice}

    def _ipython_display_(self, **_options):
        data, metadata = self._repr_mimebundle_()
        display(data, metadata=metadata, raw=True)
        display({"text/markdown": NOT_RUNNING, "text/plain": NOT_RUNNING}, raw=True)


def _checked_fields(fields):
    """Return the names of the fields; raise ValueError where a field cannot be drawn as it is described."""
    names = []
    for field in fields:
        if not field.get("name") or not field.get("label"):
            raise ValueError(f"a field needs a name and a label: {field!r}")
        name = field["name"]
        if name in names:
            raise ValueError(f"two fields are called {name!r}")
        for key in field:
            if key not in FIELD_KEYS:
                raise ValueError(f"{name}: unknown key {key!r}{nearest(key, FIELD_KEYS)}")
        if field.get("search") and not field.get("choices"):
            raise ValueError(f"{name}: nothing to search, there are no choices")
        names.append(name)
    return names


def _checked_answer(answer, names):
    """Return the judge's answer with every key present; raise ValueError where a part of it could not be shown."""
    if not isinstance(answer, dict) or not isinstance(answer.get("ok"), bool):
        raise ValueError(f'the judge must answer with a dict that says "ok", not {answer!r}')
    for key in answer:
        if key not in ANSWER_KEYS:
            raise ValueError(f"the judge answered with an unknown key {key!r}{nearest(key, ANSWER_KEYS)}")
    stamp = answer.get("stamp") or ""
    if stamp and not STAMP.fullmatch(stamp):
        raise ValueError(f"the judge's stamp must be 8 to 64 hex digits, or several, not {stamp!r}")
    told = {}
    for key in ("messages", "echo"):
        told[key] = {name: str(text) for name, text in (answer.get(key) or {}).items()}
        for name in told[key]:
            if name not in names:
                raise ValueError(f"the judge spoke of an unknown field {name!r}: {told[key][name]}")
    # The message stands beside its field, so the name in front of it says nothing more.
    messages = {name: text.removeprefix(f"{name}: ") for name, text in told["messages"].items() if text}
    said = {"messages": messages, "echo": told["echo"], "stamp": stamp, "status": str(answer.get("status") or "")}
    return {"ok": answer["ok"], **said}


def _failed(error):
    """Return the answer that shows an exception; it has no stamp, since no figure belongs to these texts."""
    return {"ok": False, "messages": {}, "echo": {}, "stamp": "", "status": "", "error": _told(error)}


def _told(error):
    """Return an exception as one readable text; an unforeseen one with its kind and place, for whoever mends it."""
    if isinstance(error, CalcError):
        return str(error)
    place = traceback.extract_tb(error.__traceback__)[-1]
    return f"{type(error).__name__}: {error} ({PurePath(place.filename).name}, line {place.lineno})"
