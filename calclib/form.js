/* The input form of a workbook. It shows fields, sends what is typed and shows the judge's answer; it decides nothing.

   Promises, in the order they matter:
   1. Figures that do not belong to the inputs on screen never look live: they are greyed and overprinted STALE.
   2. No key typed in the form reaches the notebook's commands (x and d d cut cells, a and b insert them).
   3. What is typed is never overwritten while it is being edited, nor dropped while the kernel is slow.
   4. Every text is data: it enters the page as a text node or a value, never as markup. */

const SILENCE = 2000; // ms without an answer before the kernel counts as silent; a usual answer takes well under 100
const LONGEST_JOB = 120000; // ms for the work of a button, once the kernel has said that it is at it
const SLOWEST_RETRY = 30000; // ms between questions to a silent kernel
const SETTLE = 1500; // ms by which an output may trail the answer before it counts as stale
const ARRIVAL = 2000; // ms after the last cell during which the notebook may still scroll to it
const LISTED = 50; // options of a searched list drawn at once
const STAMPS = /stamp\s+([0-9a-f]{8,})/gi; // no end mark: the next block's text may follow without a space
const DEAD = "No answer from the kernel: figures below may be stale; run the workbook again.";
const OUTDATED = "Outputs marked STALE were made from other inputs: run the workbook again.";
const UNUSABLE = "No figures belong to the entries as they are: outputs marked STALE were made from other inputs.";
const BUTTONS = { save: ["Save case", "Saving the case …"], issue: ["Issue", "Issuing …"] };

function make(tag, attributes = {}, ...children) {
  const node = document.createElement(tag);
  for (const [name, value] of Object.entries(attributes)) if (value) node.setAttribute(name, value);
  node.append(...children);
  return node;
}

/** Sends one message at a time. Edits made while one is out are merged into the next; the latest text wins. */
function openLine(model, inView, report, refuse) {
  const view = Math.random().toString(36).slice(2);
  const typed = new Map(); // name -> text that has to go out
  const late = new Map(); // id -> edits of messages given up on; the answer may come yet
  let count = 0, waiting = null, wanted = null, timer = 0, pause = SILENCE, silent = false, heard = 0;

  function post(edits, press) {
    waiting = { id: `${view}.${++count}`, edits };
    timer = setTimeout(giveUp, pause);
    try {
      model.send({ id: waiting.id, edits: [...edits], press, in_view: inView() });
    } catch (error) { // a closed comm throws: the same silence, known at once; the timer asks again
      setSilent(true);
    }
  }
  function setSilent(now) {
    silent = now;
    report(silent);
  }
  function giveUp() {
    late.set(waiting.id, waiting.edits);
    for (const [name, text] of waiting.edits) if (!typed.has(name)) typed.set(name, text);
    if (wanted) refuse(wanted); // nobody wants an issue that starts by itself when the kernel comes back
    wanted = null;
    pause = Math.min(2 * pause, SLOWEST_RETRY);
    setSilent(true);
    post(new Map(), null);
  }
  function flush() {
    if (waiting || (!typed.size && !wanted)) return;
    const edits = new Map(typed), press = wanted;
    typed.clear();
    wanted = null;
    post(edits, press);
  }
  return {
    edit(name, text) { typed.set(name, text); flush(); },
    press(button) {
      if (silent) return refuse(button);
      wanted = button;
      flush();
    },
    ask() { if (!waiting) post(new Map(), null); },
    askIfQuiet() { if (!waiting && Date.now() - heard > 10000) post(new Map(), null); },
    unheard(name) { return typed.has(name) || Boolean(waiting?.edits.has(name)); },
    isSilent() { return silent; },
    answered(reply) {
      for (const [name, text] of late.get(reply.id) ?? []) if (typed.get(name) === text) typed.delete(name);
      late.delete(reply.id);
      if (!waiting || reply.id !== waiting.id) return;
      clearTimeout(timer);
      heard = Date.now();
      pause = SILENCE;
      if (silent) setSilent(false);
      if (reply.busy) {
        timer = setTimeout(giveUp, LONGEST_JOB);
      } else {
        waiting = null;
        flush();
      }
    },
    close() { clearTimeout(timer); },
  };
}

/** Compares the stamp printed in each output of the notebook with the judge's, and marks the outputs that differ.
    An output that an edit does not touch keeps its stamp, so the judge vouches for several. */
function watchOutputs(el, current, report) {
  const since = new WeakMap(), visible = new Set(), observed = new WeakSet();
  const sight = new IntersectionObserver((entries) => {
    for (const entry of entries) entry.isIntersecting ? visible.add(entry.target) : visible.delete(entry.target);
  });
  let timer = 0, later = 0, observer = null, notebook = null;

  function stampsOf(output) {
    // A typeset formula holds no stamp, and its text is long.
    const parts = [...output.querySelectorAll(".jp-OutputArea-output")].map((part) => [...part.childNodes]
      .map((node) => (node.nodeName === "MJX-CONTAINER" ? " " : node.textContent)).join(""));
    return [...parts.join(" ").matchAll(STAMPS)].map((match) => match[1].toLowerCase());
  }

  function check() {
    for (const each of [timer, later]) clearTimeout(each);
    timer = later = 0;
    if (!notebook) {
      notebook = el.closest(".jp-Notebook");
      if (!notebook) return;
      observer = new MutationObserver((changes) => {
        if (!changes.every((change) => el.contains(change.target))) checkSoon();
      });
      observer.observe(notebook, { childList: true, characterData: true, subtree: true });
    }
    const { stamp, silent } = current();
    const valid = stamp ? stamp.split(" ") : [];
    let anyStale = false, settling = false;
    for (const output of notebook.querySelectorAll(".jp-Cell-outputWrapper")) {
      const stamps = output.contains(el) ? [] : stampsOf(output);
      const differs = stamps.some((found) => !valid.some((each) => found.startsWith(each)));
      if (!differs) since.delete(output);
      else if (!since.has(output)) since.set(output, Date.now());
      const stale = stamps.length > 0 && (silent || (differs && Date.now() - since.get(output) >= SETTLE));
      settling ||= differs && !stale;
      anyStale ||= stale;
      output.classList.toggle("calc-live", stamps.length > 0);
      output.classList.toggle("calc-stale-output", stale);
      for (const part of stamps.length ? output.querySelectorAll(".jp-OutputArea-child") : []) {
        if (!observed.has(part)) sight.observe(part);
        observed.add(part);
      }
    }
    if (settling) later = setTimeout(check, SETTLE);
    notebook.classList.toggle("calc-stale", anyStale);
    report(anyStale);
  }
  function checkSoon() { timer ||= setTimeout(check, 100); } // not before the answer is painted
  return {
    check, checkSoon,
    inView() { return [...visible].filter((part) => part.isConnected).flatMap(stampsOf); },
    close() {
      observer?.disconnect();
      sight.disconnect();
      for (const each of [timer, later]) clearTimeout(each);
      // A form that is gone vouches for nothing. Running its cell again puts a new one there, which looks for itself.
      const left = notebook;
      setTimeout(() => {
        if (!left?.isConnected || left.querySelector(".calc-form")) return;
        for (const output of left.querySelectorAll(".calc-live")) output.classList.add("calc-stale-output");
      }, SETTLE);
    },
  };
}

/** Makes a text input an ARIA combobox over a long list; any text may still be typed. */
function addSearch(input, names, label) {
  const list = make("ul", { class: "calc-options", role: "listbox", id: `${input.id}-list`, popover: "manual",
    "aria-label": label });
  const squeezed = names.map((name) => name.toUpperCase().replace(/\s+/g, ""));
  let active = -1, shown = [];
  for (const [name, value] of Object.entries({ role: "combobox", "aria-autocomplete": "list", "aria-expanded": "false",
    "aria-controls": list.id })) input.setAttribute(name, value);

  function matches(text) {
    const words = text.toUpperCase().split(/\s+/).filter(Boolean), start = words.join("");
    const found = names.map((name, i) => i).filter((i) => words.every((word) => squeezed[i].includes(word)));
    const first = (i) => (squeezed[i].startsWith(start) ? 0 : 1);
    return found.sort((a, b) => first(a) - first(b) || a - b);
  }
  function open(text) {
    const found = matches(text);
    shown = found.slice(0, LISTED).map((i) => names[i]);
    active = -1;
    input.removeAttribute("aria-activedescendant");
    if (!shown.length || (shown.length === 1 && shown[0] === text)) return close();
    list.replaceChildren(...shown.map((name, i) => make("li", { role: "option", id: `${list.id}-${i}` }, name)));
    const more = found.length - shown.length;
    if (more) list.append(make("li", { class: "calc-more", role: "presentation" }, `${more} more: type on to narrow`));
    list.showPopover(); // the top layer: an output area would clip it
    const box = input.getBoundingClientRect(), below = window.innerHeight - box.bottom;
    list.style.left = `${box.left}px`;
    list.style.minWidth = `${box.width}px`;
    list.style.maxHeight = `${Math.min(260, Math.max(below, box.top) - 12)}px`;
    list.style.top = below > 160 || below > box.top ? `${box.bottom + 2}px` : "auto";
    list.style.bottom = list.style.top === "auto" ? `${window.innerHeight - box.top + 2}px` : "auto";
    input.setAttribute("aria-expanded", "true");
  }
  function close() {
    if (list.matches(":popover-open")) list.hidePopover();
    input.setAttribute("aria-expanded", "false");
    input.removeAttribute("aria-activedescendant");
    active = -1;
  }
  function isOpen() { return input.getAttribute("aria-expanded") === "true"; }
  function move(step) {
    if (!isOpen()) open(names.includes(input.value) ? "" : input.value);
    if (!isOpen()) return;
    const options = list.querySelectorAll("[role=option]");
    options[active]?.removeAttribute("aria-selected");
    active = (active + step + options.length + (active < 0 && step < 0 ? 1 : 0)) % options.length;
    options[active].setAttribute("aria-selected", "true");
    input.setAttribute("aria-activedescendant", options[active].id);
    list.scrollTop = options[active].offsetTop - list.clientHeight / 2;
  }
  function pick(name) {
    input.value = name;
    close();
    input.dispatchEvent(new Event("input", { bubbles: true }));
    close();
  }
  list.addEventListener("mousedown", (event) => {
    event.preventDefault(); // the focus stays in the field
    const option = event.target.closest("[role=option]");
    if (option) pick(option.textContent);
  });
  input.addEventListener("input", () => open(input.value));
  input.addEventListener("blur", close);
  input.after(list);
  return { close, isOpen, move, pickActive() { if (active >= 0) pick(shown[active]); else close(); } };
}

function drawSymbol(symbol) {
  const [main, ...below] = symbol.replace(/[{}]/g, "").split("_");
  return make("var", {}, main, ...(below.length ? [make("sub", {}, below.join(","))] : []));
}

/** Draws one field; returns its parts and how to read and write it. */
function drawField(spec, id) {
  const listed = spec.choices && !spec.search;
  const control = make(listed ? "select" : "input", {
    id, class: "calc-control", "data-lm-suppress-shortcuts": "true", autocomplete: "off", spellcheck: "false",
    "aria-describedby": `${id}-unit ${id}-echo ${id}-message ${id}-help`, "aria-required": spec.optional ? "" : "true",
    ...(listed ? {} : { type: "text", autocapitalize: "off" }),
  });
  const blank = listed && spec.optional && !spec.choices.includes("") ? new Option("", "") : null;
  if (blank) control.append(blank);
  if (listed) for (const choice of spec.choices) control.append(new Option(choice, choice));
  const label = make("label", { for: id }, spec.label);
  if (spec.symbol) label.append(" ", drawSymbol(spec.symbol));
  if (spec.optional) label.append(" ", make("span", { class: "calc-optional" }, "optional"));
  const unit = make("span", { class: "calc-unit", id: `${id}-unit` });
  const echo = make("span", { class: "calc-echo", id: `${id}-echo` });
  const message = make("div", { class: "calc-message", id: `${id}-message` });
  const help = make("div", { class: "calc-help", id: `${id}-help` }, spec.help || "");
  const entry = make("div", { class: spec.unit ? "calc-entry calc-measured" : "calc-entry" }, control, unit, echo);
  const box = make("div", { class: "calc-field" }, label, entry, make("div", { class: "calc-below" }, message, help));
  function describe({ unit: hint, blank: meaning, example }) {
    unit.textContent = hint || "";
    if (blank) blank.text = meaning || "(none)";
    if (!listed) control.placeholder = meaning || (example ? `e.g. ${example}` : "");
  }
  describe(spec);
  return {
    name: spec.name, label: spec.label, box, control, committed: "", describe,
    search: spec.search ? addSearch(control, spec.choices, spec.label) : null,
    write(text) {
      // A text that is not among the choices is shown as it is, so that nothing is chosen behind the engineer's back.
      if (listed && ![...control.options].some((option) => option.value === text)) {
        control.prepend(new Option(text ? `${text} (not in the list)` : "(choose)", text));
      }
      control.value = text;
    },
    show(reply) {
      const wrong = reply.messages[spec.name];
      const read = reply.echo[spec.name] ? `= ${reply.echo[spec.name]}` : "";
      // Written only where it differs: forty fields at every key would cost as much as a block of equations.
      if (message.textContent !== (wrong || "")) message.textContent = wrong || "";
      if (control.getAttribute("aria-invalid") !== String(Boolean(wrong))) control.setAttribute("aria-invalid", Boolean(wrong));
      if (echo.textContent !== read) echo.title = echo.textContent = read;
    },
  };
}

/** Brings the form into view once the workbook has run, since the notebook ends up at the last cell; not where the
    reader has scrolled, clicked or typed meanwhile, nor where a page is opened on a workbook that has run before. */
function comeIntoView(model, el) {
  if (model.get("complete")) return () => {};
  const acts = ["wheel", "pointerdown", "keydown", "touchmove"];
  let timer = 0;
  function stop() {
    clearInterval(timer);
    for (const act of acts) window.removeEventListener(act, stop, true);
    model.off("change:complete", start);
  }
  function start() {
    const end = Date.now() + ARRIVAL;
    timer = setInterval(() => {
      const page = el.closest(".jp-WindowedPanel-outer") || document.documentElement;
      const top = el.getBoundingClientRect().top - page.getBoundingClientRect().top;
      if (el.isConnected && (top < -5 || top > page.clientHeight / 2)) el.scrollIntoView({ block: "start" });
      if (Date.now() > end) stop();
    }, 100);
  }
  for (const act of acts) window.addEventListener(act, stop, true);
  model.on("change:complete", start);
  return stop;
}

function render({ model, el }) {
  const root = make("div", { class: "calc-form", role: "group", "aria-label": "Inputs of the calc", tabindex: "-1",
    "data-lm-suppress-shortcuts": "true" });
  const banner = make("div", { class: "calc-banner", role: "alert" });
  const doubt = make("div", { class: "calc-banner", role: "status" }); // at the foot, so that no field moves
  const status = make("div", { class: "calc-status", role: "status" });
  const notice = make("div", { class: "calc-notice", role: "status" });
  const view = Math.random().toString(36).slice(2);
  const fields = model.get("fields").map((spec, i) => drawField(spec, `calc-${view}-${i}`));
  const fieldOf = new Map(fields.map((field) => [field.control, field]));
  let staleOutputs = false, told = "";

  const line = openLine(model, () => outputs.inView(), showSilence, (button) => {
    notice.textContent = `${BUTTONS[button][0]}: not done, the kernel does not answer. Press it again when it does.`;
    notice.classList.add("calc-wrong");
  });
  const outputs = watchOutputs(el, () => ({ stamp: model.get("reply").stamp, silent: line.isSilent() }), (stale) => {
    staleOutputs = stale;
    showBanner();
  });

  function showBanner() {
    const stamp = model.get("reply").stamp;
    const text = line.isSilent() ? DEAD : staleOutputs ? (stamp ? OUTDATED : UNUSABLE) : "";
    if (text === told) return;
    told = text;
    banner.textContent = line.isSilent() ? text : "";
    doubt.textContent = line.isSilent() ? "" : text;
    root.classList.toggle("calc-silent", line.isSilent());
    el.dispatchEvent(new CustomEvent("calc-stale", { bubbles: true, detail: { stale: text !== "", reason: text } }));
  }
  function showSilence() {
    for (const button of root.querySelectorAll("button")) button.setAttribute("aria-disabled", line.isSilent());
    showStatus();
    showBanner();
    outputs.check();
  }
  function showStatus() {
    const reply = model.get("reply");
    const labels = (test) => fields.filter(test).map((field) => field.label).join(", ");
    const wrong = labels((field) => reply.messages[field.name]), unheard = labels((field) => line.unheard(field.name));
    const silent = line.isSilent(); // then a "saved" of before says nothing about what stands in the fields now
    status.textContent = silent ? (unheard && `Not recorded: ${unheard}`)
      : reply.error || (wrong && `Needs attention: ${wrong}. `) + reply.status;
    status.classList.toggle("calc-wrong", silent || !reply.ok);
  }
  function showReply() {
    const reply = model.get("reply");
    line.answered(reply);
    for (const field of fields) {
      field.show(reply);
      field.box.classList.toggle("calc-unread", line.unheard(field.name));
    }
    showStatus();
    const before = reply.notice.text && reply.notice.earlier ? "Before the last change: " : "";
    notice.textContent = reply.busy ? BUTTONS[reply.busy][1] : before + reply.notice.text;
    notice.classList.toggle("calc-wrong", !reply.notice.ok);
    showBanner();
    outputs.checkSoon();
  }
  function showTexts() {
    const texts = model.get("texts");
    for (const field of fields) {
      const text = texts[field.name], edited = field.control.value !== field.committed;
      if (line.unheard(field.name) || (field.control === document.activeElement && edited)) continue;
      if (field.control.value !== text) field.write(text);
      field.committed = text;
    }
  }
  function send(field) {
    field.box.classList.add("calc-unread");
    line.edit(field.name, field.control.value);
    if (line.isSilent()) showStatus();
  }
  function commit(field) {
    field.committed = field.control.value;
    // Somebody else (another view, the kernel) may have changed this text meanwhile: what stands here is what counts.
    if (field.committed !== model.get("texts")[field.name] && !line.unheard(field.name)) send(field);
  }

  root.addEventListener("input", (event) => {
    const field = fieldOf.get(event.target);
    if (field) send(field);
  });
  root.addEventListener("focusin", () => line.askIfQuiet());
  root.addEventListener("focusout", (event) => {
    const field = fieldOf.get(event.target);
    if (field) commit(field);
  });
  root.addEventListener("contextmenu", (event) => {
    if (fieldOf.has(event.target)) event.stopPropagation(); // cut and paste of text, not of cells
  });
  root.addEventListener("keydown", (event) => {
    if ((event.ctrlKey || event.metaKey) && !event.altKey && !event.shiftKey && event.key === "s") {
      // The one command let through: saving the notebook harms nothing, and is a habit.
      const guarded = new Set([event.target, root]);
      for (const node of guarded) node.removeAttribute("data-lm-suppress-shortcuts");
      setTimeout(() => { for (const node of guarded) node.setAttribute("data-lm-suppress-shortcuts", "true"); });
      return;
    }
    event.stopPropagation();
    const field = fieldOf.get(event.target);
    if (!field || event.isComposing || event.ctrlKey || event.metaKey || event.altKey) return;
    const { search, control } = field;
    if (event.key === "Enter" && !event.shiftKey) {
      event.preventDefault();
      search?.pickActive();
      commit(field);
      const stops = [...root.querySelectorAll(".calc-control, button")];
      const next = stops[stops.indexOf(control) + 1];
      next?.focus();
      next?.select?.();
    } else if (event.key === "Escape") {
      if (search?.isOpen()) return search.close();
      if (control.value === field.committed) return;
      field.write(field.committed);
      send(field);
    } else if (search && (event.key === "ArrowDown" || event.key === "ArrowUp")) {
      event.preventDefault();
      search.move(event.key === "ArrowDown" ? 1 : -1);
    }
  });

  root.append(banner);
  const grids = new Map();
  model.get("fields").forEach((spec, i) => {
    const heading = spec.group || "";
    if (!grids.has(heading)) {
      const grid = make("div", { class: "calc-grid" });
      root.append(make("fieldset", {}, ...(heading ? [make("legend", {}, heading)] : []), grid));
      grids.set(heading, grid);
    }
    grids.get(heading).append(fields[i].box);
  });
  const foot = make("div", { class: "calc-foot" });
  for (const name of model.get("buttons")) {
    const button = make("button", { type: "button", "data-lm-suppress-shortcuts": "true" }, BUTTONS[name][0]);
    // The help below a field goes when the field is left; the button would move away from under the pointer.
    button.addEventListener("mousedown", (event) => event.preventDefault());
    button.addEventListener("click", () => {
      button.focus();
      line.press(name);
    });
    foot.append(button);
  }
  foot.append(status);
  root.append(foot, notice, doubt);
  el.append(root);

  model.on("change:texts", showTexts);
  model.on("change:reply", showReply);
  model.on("change:fields", () => model.get("fields").forEach((spec, i) => fields[i].describe(spec)));
  model.on("msg:custom", ({ drawn }) => {
    // After the next frame: what was sent before this message is then on the screen.
    if (drawn) requestAnimationFrame(() => setTimeout(() => model.send({ painted: drawn })));
  });
  // A restart kills the widget in the kernel. Where the front end tells of one, ask at once; else at the next focus.
  const kernel = model.widget_manager?.kernel;
  const onStatus = (_, state) => { if (state !== "idle" && state !== "busy") line.ask(); };
  kernel?.statusChanged?.connect(onStatus);
  model.on("comm_live_update", () => line.ask());
  const stopArriving = comeIntoView(model, el);
  showTexts();
  showReply();
  line.ask();
  const attached = setInterval(() => { if (el.isConnected) { clearInterval(attached); outputs.check(); } }, 100);
  return () => {
    clearInterval(attached);
    stopArriving();
    kernel?.statusChanged?.disconnect(onStatus);
    line.close();
    outputs.close();
  };
}

export default { render };
