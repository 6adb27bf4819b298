"""Outputs of a notebook that follow a calc: replaced a few at a time, what the reader has before the eyes first.

The page typesets every equation that it is sent before it paints any. So the next block is sent when the page says
that it has painted the one before; an edit that comes meanwhile drops what is left of the older calc.
"""

import atexit
from threading import Condition, Lock, RLock, Thread

from IPython.display import display

PATIENCE = 0.5  # seconds until a page that does not answer, such as one in the background, is sent the next output
SETTLE = 0.8    # seconds without an edit until the drawings are stored as vectors too
_END = object()


class LiveOutputs:
    """The outputs shown so far, and the thread that brings them up to date.

    Parameters
    ----------
    draw : called as `draw(calc, vectors)`; gives {key: Output} of the pictures, one group after the other
    close : called as `close(calc)`; returns {key: Output} of what is stored once everything else is up to date
    told : called with a number after some outputs were replaced; `painted` is called with it when they can be seen
    failed : called with an exception that ended the work; the outputs are then of several calcs
    """

    def __init__(self, draw, close, told, failed):
        self._draw, self._close, self._told, self._failed = draw, close, told, failed
        self.shown = {}                    # key -> Output, in the order of the page
        self.pencil = Lock()               # held by whoever draws: overlapping drawings come out wrong
        self._handles = {}
        self._news = Condition(RLock())    # guards what follows; nothing that waits for another lock is called under it
        self._target = None                # (calc, {key: Output} of the words, stamps in view)
        self._done = None                  # the target that the thread was at last
        self._sent = self._painted = 0
        self._thread = None

    def show(self, key, output):
        """Show one more output."""
        with self._news:
            self._handles[key] = display(output.data, raw=True, display_id=True, metadata=output.metadata)
            self.shown[key] = output

    def follow(self, calc, words, in_view):
        """Bring everything that is shown up to date with a calc; return at once.

        words : key -> Output, of all that is not drawn
        in_view : stamps of the outputs that the reader has before the eyes
        """
        with self._news:
            self._target = (calc, words, frozenset(in_view))
            self._news.notify_all()
            if self._thread is None:
                self._thread = Thread(target=self._run, name="outputs of the calc", daemon=True)
                self._thread.start()
                atexit.register(self.end)  # a thread that is cut off while it draws takes the process down with it

    def painted(self, number):
        """Take note that the page has painted what `told` was called for."""
        with self._news:
            self._painted = max(self._painted, number)
            self._news.notify_all()

    def end(self):
        """Stop following; what is being drawn is finished."""
        with self._news:
            self._target = _END
            self._news.notify_all()
        self._thread.join()

    def _run(self):
        while True:
            with self._news:
                self._news.wait_for(lambda: self._target is not self._done)
                target = self._done = self._target
            if target is _END:
                return
            try:
                self._bring(target)
            except Exception as error:  # nobody waits for this thread, so what went wrong has to be told
                self._failed(error)

    def _bring(self, target):
        calc, words, in_view = target
        for portion in self._portions(words, in_view):
            if not self._replace(target, portion):
                return
            self._await_paint(target)
        for vectors in (False, True):
            if vectors and self._overtaken(target, SETTLE):
                return
            with self.pencil:
                for pictures in self._draw(calc, vectors):
                    if not self._replace(target, pictures):
                        return
        self._replace(target, self._close(calc))

    def _portions(self, words, in_view):
        """Return the words that changed, cut after every block of equations: in view, other equations, the rest."""
        with self._news:
            changed = [key for key in self.shown if key in words and words[key] != self.shown[key]]
            order = sorted(changed, key=lambda key: (self.shown[key].stamp not in in_view, not _slow(words[key])))
        portions = [{}]
        for key in order:
            portions[-1][key] = words[key]
            if _slow(words[key]):
                portions.append({})
        return [each for each in portions if each]

    def _replace(self, target, outputs):
        """Replace the outputs that differ; return False, and do nothing, where an edit has overtaken this calc."""
        with self._news:
            if self._target is not target:
                return False
            for key, output in outputs.items():
                if key in self.shown and self.shown[key] != output:
                    self._handles[key].update(output.data, raw=True, metadata=output.metadata)
                    self.shown[key] = output
            return True

    def _await_paint(self, target):
        with self._news:
            self._sent += 1
            number = self._sent
            self._told(number)
            self._news.wait_for(lambda: self._painted >= number or self._target is not target, PATIENCE)

    def _overtaken(self, target, seconds):
        with self._news:
            return self._news.wait_for(lambda: self._target is not target, seconds)


def _slow(output):
    return "text/latex" in output.data
