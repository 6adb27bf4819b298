"""The form without a browser: what the judge is asked, what the page is told, and that no failure goes unseen."""

import threading

import pytest

from calclib.errors import EntryError
from calclib.form import NOT_RUNNING, Form

FIELDS = [
    {"name": "hole_diameter", "label": "Hole diameter", "symbol": "d_h", "unit": "in or mm", "example": "13/16 in"},
    {"name": "steel", "label": "Steel", "choices": ["A36", "A572 Gr. 50"], "group": "Material"},
    {"name": "project", "label": "Project", "optional": True, "slider": None},
]
TEXTS = {"hole_diameter": "13/16 in", "steel": "A36"}
STAMP = "3f9a0c1d22e4"


def agree(name, text, texts):
    return {"ok": True, "messages": {}, "echo": {"hole_diameter": "0.8125 in"}, "stamp": STAMP, "status": "saved"}


def send(form, edits=(), press=None, message_id="v.1"):
    """Deliver a message of the page, as the kernel would."""
    content = {"id": message_id, "edits": [list(edit) for edit in edits], "press": press, "in_view": []}
    form._handle_custom_msg(content, [])
    return form.reply


class Judge:
    """Remembers what it was asked."""

    def __init__(self):
        self.asked = []

    def __call__(self, name, text, texts):
        self.asked.append((name, text, texts))
        return agree(name, text, texts)


def test_the_judge_is_asked_once_when_the_form_is_made():
    judge = Judge()
    form = Form(FIELDS, TEXTS, judge)
    assert judge.asked == [(None, None, {**TEXTS, "project": ""})]
    assert form.reply == {
        "ok": True, "messages": {}, "echo": {"hole_diameter": "0.8125 in"}, "stamp": STAMP, "status": "saved",
        "error": "", "busy": "", "notice": {"ok": True, "text": "", "earlier": True}, "id": "",
    }  # fmt: skip


def test_a_text_is_kept_and_judged_exactly_as_typed():
    judge = Judge()
    form = Form(FIELDS, TEXTS, judge)
    for text in ("", " 13/16  in ", "1½ in", "<b>7</b> $x$ =1+1 ../..", "d d", "2\u00a0in"):
        assert form.set_text("hole_diameter", text)["ok"]
        assert form.texts["hole_diameter"] == text
        assert judge.asked[-1] == ("hole_diameter", text, {**TEXTS, "project": "", "hole_diameter": text})


def test_the_judge_cannot_change_the_texts_behind_the_form():
    def meddle(name, text, texts):
        texts["hole_diameter"] = "1 in"
        return agree(name, text, texts)

    assert Form(FIELDS, TEXTS, meddle).texts == {**TEXTS, "project": ""}


def test_a_message_of_the_page_does_what_set_text_does():
    judge = Judge()
    form = Form(FIELDS, TEXTS, judge)
    assert send(form, [("hole_diameter", "20 mm"), ("steel", "A572 Gr. 50")])["id"] == "v.1"
    assert form.texts == {"hole_diameter": "20 mm", "steel": "A572 Gr. 50", "project": ""}
    assert [asked[:2] for asked in judge.asked[1:]] == [("hole_diameter", "20 mm"), ("steel", "A572 Gr. 50")]


def test_only_the_last_step_of_a_message_answers_it():
    form = Form(FIELDS, TEXTS, agree, on_save=lambda: "Case saved.")
    seen = []
    form.observe(lambda change: seen.append((change["new"]["id"], change["new"]["busy"])), "reply")
    send(form, [("hole_diameter", "20 mm"), ("project", "P")], press="save")
    assert seen == [("v.1", "save"), ("v.1", "")]  # the edits answer nobody, so they change nothing in this reply


def test_a_page_that_asks_is_answered_without_the_judge():
    judge = Judge()
    form = Form(FIELDS, TEXTS, judge)
    assert send(form, message_id="v.7")["id"] == "v.7"
    assert len(judge.asked) == 1


def test_a_message_beside_its_field_does_not_repeat_the_name():
    def refuse(name, text, texts):
        messages = {"hole_diameter": 'hole_diameter: 20 has no unit; write "20 mm".', "steel": ""}
        return {"ok": False, "messages": messages}

    reply = Form(FIELDS, TEXTS, refuse).reply
    assert reply["messages"] == {"hole_diameter": '20 has no unit; write "20 mm".'}
    assert (reply["ok"], reply["stamp"], reply["error"]) == (False, "", "")


def test_an_exception_of_the_judge_shows_and_takes_the_stamp_away():
    def judge(name, text, texts):
        return agree(name, text, texts) if text is None else {"ok": 1 / 0}

    form = Form(FIELDS, TEXTS, judge)
    assert form.reply["stamp"] == STAMP
    for reply in (form.set_text("hole_diameter", "2 in"), send(form, [("hole_diameter", "3 in")])):
        assert reply["error"].startswith("ZeroDivisionError: division by zero (test_form.py, line ")
        assert (reply["ok"], reply["stamp"], reply["echo"]) == (False, "", {})
    assert form.texts["hole_diameter"] == "3 in"


def test_a_calc_error_shows_as_it_is_written():
    def judge(name, text, texts):
        raise EntryError("thread", "no such thread")

    assert Form(FIELDS, TEXTS, judge).reply["error"] == "thread: no such thread."


@pytest.mark.parametrize(
    ("answer", "error"),
    [
        (None, 'the judge must answer with a dict that says "ok", not None'),
        ({"ok": "yes"}, "the judge must answer with a dict that says \"ok\", not {'ok': 'yes'}"),
        ({"ok": True, "stamp": "draft"}, "the judge's stamp must be 8 to 64 hex digits, or several, not 'draft'"),
        ({"ok": True, "massages": {}}, "the judge answered with an unknown key 'massages'; did you mean \"messages\"?"),
        ({"ok": False, "messages": {"tread": "no"}}, "the judge spoke of an unknown field 'tread': no"),
    ],
)
def test_an_answer_that_cannot_be_shown_is_itself_shown_as_an_error(answer, error):
    reply = Form(FIELDS, TEXTS, lambda name, text, texts: answer).reply
    assert reply["error"].startswith(f"ValueError: {error} (form.py, line ")
    assert reply["stamp"] == ""


def test_an_unknown_field_is_refused():
    form = Form(FIELDS, TEXTS, agree)
    with pytest.raises(ValueError, match="unknown field 'hole_diametre'; did you mean \"hole_diameter\"\\?"):
        form.set_text("hole_diametre", "1 in")
    with pytest.raises(ValueError, match="hole_diameter: a field holds text, not 20"):
        form.set_text("hole_diameter", 20)
    reply = send(form, [("bolt", "1 in")], message_id="v.3")
    assert reply["error"].startswith("ValueError: unknown field 'bolt'") and reply["id"] == "v.3"
    assert form.texts == {**TEXTS, "project": ""}


@pytest.mark.parametrize(
    ("fields", "texts", "message"),
    [
        ([{"name": "a"}], {}, "a field needs a name and a label: {'name': 'a'}"),
        ([{"name": "a", "label": "A"}, {"name": "a", "label": "B"}], {}, "two fields are called 'a'"),
        ([{"name": "a", "label": "A", "choises": []}], {}, "a: unknown key 'choises'; did you mean \"choices\"?"),
        ([{"name": "a", "label": "A", "search": True}], {}, "a: nothing to search, there are no choices"),
        (
            [{"name": "thread", "label": "T"}],
            {"tread": ""},
            "text for an unknown field 'tread'; did you mean \"thread\"?",
        ),
        ([{"name": "a", "label": "A"}], {"a": 20}, "a: a field holds text, not 20"),
    ],
)
def test_fields_and_texts_that_do_not_fit_are_refused(fields, texts, message):
    with pytest.raises(ValueError) as caught:
        Form(fields, texts, agree)
    assert str(caught.value) == message


def test_a_button_shows_what_its_work_returns():
    form = Form(FIELDS, TEXTS, agree, on_save=lambda: "Case saved: cases/demo.yaml")
    assert form.buttons == ["save"]
    assert form.press("save")["notice"] == {"ok": True, "text": "Case saved: cases/demo.yaml", "earlier": False}
    with pytest.raises(ValueError, match="the form has no button 'issue'"):
        form.press("issue")


def test_what_a_button_said_counts_as_earlier_after_the_next_change():
    form = Form(FIELDS, TEXTS, agree, on_save=lambda: "Case saved.")
    form.press("save")
    assert form.set_text("project", "P")["notice"] == {"ok": True, "text": "Case saved.", "earlier": True}
    assert form.set_text("project", "")["notice"] == {"ok": True, "text": "Case saved.", "earlier": False}


def test_a_button_whose_work_fails_says_why_and_leaves_the_answer_alone():
    def issue():
        raise PermissionError("exports/T-101-A.pdf is open elsewhere")

    form = Form(FIELDS, TEXTS, agree, on_issue=issue)
    reply = send(form, press="issue")
    assert reply["notice"]["text"].startswith("PermissionError: exports/T-101-A.pdf is open elsewhere (test_form.py")
    assert (reply["notice"]["ok"], reply["ok"], reply["stamp"], reply["busy"]) == (False, True, STAMP, "")


def test_work_that_ends_without_a_text_is_an_error():
    notice = Form(FIELDS, TEXTS, agree, on_save=lambda: None).press("save")["notice"]
    assert notice["text"].startswith('TypeError: the work behind "save" must end with a text to show, not None')


def test_work_may_change_a_text_and_still_answers_the_page():
    form = Form(FIELDS, TEXTS, agree, on_issue=lambda: form.set_text("project", "P")["status"])
    reply = send(form, press="issue", message_id="v.9")
    assert (reply["id"], reply["busy"], reply["notice"]["text"], form.texts["project"]) == ("v.9", "", "saved", "P")


def test_two_threads_never_judge_at_once():
    inside, most = [], []

    def judge(name, text, texts):
        inside.append(text)
        most.append(len(inside))
        pause.wait(0.01)
        inside.pop()
        return agree(name, text, texts)

    pause = threading.Event()
    form = Form(FIELDS, TEXTS, judge)
    threads = [threading.Thread(target=send, args=(form, [("project", str(n))], None, f"v.{n}")) for n in range(8)]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert max(most) == 1 and len(most) == 9
    assert form.reply["id"] == f"v.{form.texts['project']}"  # text and answer are of the same message


def test_the_stored_output_tells_a_reader_without_a_kernel_what_to_do(monkeypatch):
    shown = []
    monkeypatch.setattr("calclib.form.display", lambda data, **options: shown.append((data, options)))
    Form(FIELDS, TEXTS, agree)._ipython_display_()
    assert "application/vnd.jupyter.widget-view+json" in shown[0][0]
    assert shown[1][0] == {"text/markdown": NOT_RUNNING, "text/plain": NOT_RUNNING}


def test_the_page_gets_script_and_style_and_neither_reaches_outside():
    form = Form(FIELDS, TEXTS, agree)
    assert "export default" in form._esm and ".calc-form" in form._css
    for source in (form._esm, form._css):
        assert "http" not in source.replace("http://www.w3.org/2000/svg", "")  # a name, not an address that is fetched
        assert "innerHTML" not in source
