"""The house: what may import what, where rows are written, how large things grow. Each rule has a planted violation."""

import ast
import re
from pathlib import Path

import pytest
from django.template.loader import get_template

ROOT = Path(__file__).resolve().parents[1]
FLOORS = (
    ("registry", "errors", "methods", "profiles", "drawing", "setup", "sqlite", "formats"),
    ("ledger", "aircraft", "web"),
    ("files", "parts", "readings", "calcs"),
    ("shop", "trials", "weighing"),
    ("conformity",),
    ("binder", "find", "desk"),
)
PURE = {"registry", "errors", "methods", "profiles", "drawing", "setup"}
ABOVE_ALL = {"settings", "urls", "wsgi", "models", "migrations", "management", "templatetags"}
WRITES = {"create", "bulk_create", "save", "delete", "update", "get_or_create", "update_or_create"}
# Where a word of WRITES is no write to the record: sessions, forms, digests, mappings, and the ledger's own writer.
NO_RECORD = {
    "ledger/actions.py",
    "management/commands/flush.py",
    "profiles",
    "methods",
    "drawing",
    "setup",
    "web",
    "files/decode.py",
}
FILES = sorted((ROOT / "buildlog").rglob("*.py"))
CODE = [path for path in FILES if "migrations" not in path.parts]


def room_of(path: Path) -> str:
    first = path.relative_to(ROOT / "buildlog").parts[0]
    return first.removesuffix(".py")


def place_of(room: str) -> tuple[int, int]:
    for floor, rooms in enumerate(FLOORS):
        if room in rooms:
            return floor, rooms.index(room)
    raise AssertionError(f"room {room} has no floor: add it to FLOORS and to DEVELOPERS.md")


def imports(tree: ast.AST) -> list[tuple[str, bool]]:
    """Return every module imported, and whether it stands inside a function."""
    inner = {
        id(node)
        for function in ast.walk(tree)
        if isinstance(function, ast.FunctionDef | ast.AsyncFunctionDef)
        for node in ast.walk(function)
    }
    found = []
    for node in ast.walk(tree):
        if isinstance(node, ast.ImportFrom) and node.module:
            names = [f"{node.module}.{one.name}" for one in node.names] if node.module == "buildlog" else [node.module]
            found += [(name, id(node) in inner) for name in names]
        elif isinstance(node, ast.Import):
            found += [(one.name, id(node) in inner) for one in node.names]
    return found


def import_faults(room: str, source: str, *, is_page: bool = False) -> list[str]:
    # Forms and views of every room stand on the web room, which itself knows people and rights.
    faults = []
    for name, inside in imports(ast.parse(source)):
        if room in PURE and name.split(".")[0] == "django" and room != "setup":
            faults.append(f"{room} is pure and imports {name}")
        if not name.startswith("buildlog.") or room in ABOVE_ALL:
            continue
        if inside:
            faults.append(f"{room} hides an import of {name} in a function")
        other = name.split(".")[1]
        if other != room and other not in ABOVE_ALL and not (is_page and other == "web"):
            (floor, at), (below, there) = place_of(room), place_of(other)
            pure = floor == 0 and below == 0
            if below > floor or (below == floor and there > at and not pure):
                faults.append(f"{room} imports {name}, which lies above it")
    return faults


def write_faults(path: str, source: str) -> list[str]:
    if "actions" in path or any(path.startswith(one) for one in NO_RECORD):
        return []
    return [
        f"{path}:{node.lineno} writes outside an action"
        for node in ast.walk(ast.parse(source))
        if isinstance(node, ast.Call)
        and isinstance(node.func, ast.Attribute)
        and node.func.attr in WRITES
        and "objects" in ast.unparse(node.func)
    ]


def size_faults(path: str, source: str) -> list[str]:
    faults = [f"{path} has over 300 lines"] if source.count("\n") > 300 else []
    for node in ast.walk(ast.parse(source)):
        if isinstance(node, ast.FunctionDef):
            body = node.end_lineno - node.body[0].lineno + 1
            if body > 40:
                faults.append(f"{path}: {node.name} has {body} lines")
    return faults


def docstring_faults(path: str, source: str) -> list[str]:
    tree = ast.parse(source)
    if source.strip() and not ast.get_docstring(tree):
        return [f"{path} does not say what it holds"]
    return [
        f"{path}: {node.name} has no docstring"
        for node in tree.body
        if isinstance(node, ast.FunctionDef | ast.ClassDef)
        and not node.name.startswith("_")
        and not ast.get_docstring(node)
    ]


def template_faults(path: str, text: str) -> list[str]:
    faults = [f"{path} has over 120 lines"] if text.count("\n") > 120 else []
    text = re.sub(r"{%.*?%}|{{.*?}}", "", text, flags=re.S)
    for wrong, pattern in (("style", r"\sstyle="), ("handler", r"\son[a-z]+="), ("htmx", r"\shx-")):
        faults += [f"{path} has an inline {wrong}"] if re.search(pattern, text) else []
    if re.search(r"<script(?![^>]*\bsrc=)", text) or "<style" in text:
        faults.append(f"{path} has an inline script or style")
    return faults


@pytest.mark.parametrize("path", CODE, ids=lambda path: str(path.relative_to(ROOT)))
def test_a_file_keeps_the_laws(path):
    source, name = path.read_text(), str(path.relative_to(ROOT / "buildlog"))
    is_page = bool(re.search(r"/(forms|views|urls|site_urls|facts_form)(/|\.py)", str(path)))
    faults = import_faults(room_of(path), source, is_page=is_page) if path.parent != ROOT / "buildlog" else []
    assert faults + write_faults(name, source) + size_faults(name, source) + docstring_faults(name, source) == []


def test_pages_and_styles_keep_the_laws():
    faults = []
    for path in (ROOT / "templates").rglob("*.html"):
        faults += template_faults(str(path.relative_to(ROOT)), path.read_text())
    for path in [*(ROOT / "static" / "css").glob("*.css"), *(ROOT / "static" / "js").glob("*.js")]:
        faults += [f"{path.name} has over 200 lines"] if path.read_text().count("\n") > 200 else []
    assert faults == []


def test_every_page_uses_words_that_there_are():
    for path in (ROOT / "templates").rglob("*.html"):
        get_template(str(path.relative_to(ROOT / "templates")))


def test_the_top_level_holds_what_it_should():
    allowed = {"README.md", "DEVELOPERS.md", "manage.py", "pyproject.toml", "LICENSE", "requirements.lock"}
    folders = {"buildlog", "templates", "static", "tests", "fixtures"}
    found = {path.name for path in ROOT.iterdir() if not path.name.startswith(".")}
    assert found <= allowed | folders and allowed <= found


@pytest.mark.parametrize(
    ("faults", "words"),
    [
        (import_faults("parts", "from buildlog.shop import queries"), "above it"),
        (import_faults("methods", "import django.db"), "pure"),
        (import_faults("shop", "def f():\n    from buildlog.files import store"), "hides"),
        (write_faults("shop/views.py", "Entry.objects.create(x=1)"), "outside an action"),
        (size_faults("x.py", "\n" * 301), "over 300"),
        (size_faults("x.py", "def f():\n" + "    x = 1\n" * 60), "60 lines"),
        (docstring_faults("x.py", "def f():\n    pass"), "does not say"),
        (template_faults("x.html", '<p style="color:red">'), "inline style"),
        (template_faults("x.html", "<a onclick=x>"), "inline handler"),
        (template_faults("x.html", "<script>alert(1)</script>"), "inline script"),
    ],
)
def test_a_planted_violation_is_found(faults, words):
    assert faults and words in faults[0]
