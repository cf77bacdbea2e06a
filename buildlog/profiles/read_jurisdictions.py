"""One authority's profile from its file."""

from types import MappingProxyType

from buildlog.profiles.read import Table, once
from buildlog.profiles.shapes import Closing, Demand, Grade, Jurisdiction, Paper, ShareRule, Stage, Units

# A line that nobody has read may be shown, never asked for.
UNREAD = ("memory", "doubtful")


def read_demands(top: Table) -> tuple[Demand, ...]:
    """The demands of one file, in its order."""
    demands = tuple(_read_demand(row) for row in top.rows("demand"))
    once("demand", [demand.key for demand in demands])
    return demands


def _read_demand(row: Table) -> Demand:
    stage: Stage = row.word("stage", Stage)
    grade: Grade = row.word("grade", Grade)
    demand = Demand(
        key=row.text("key"),
        title=row.text("title"),
        stage=stage,
        text=row.text("text"),
        form=row.text("form"),
        grade=grade,
        source=row.text("source", ""),
        edition=row.text("edition", ""),
        on=row.yes("on"),
    )
    row.done()
    if demand.on and grade in UNREAD:
        raise row.wrong("a demand from memory stays off until someone has read its source")
    if grade != "practice" and not (demand.source and demand.edition):
        raise row.wrong("a demand names its source and edition, unless it is common practice")
    return demand


def read_jurisdiction(top: Table, everywhere: tuple[Demand, ...]) -> Jurisdiction:
    """A profile; `everywhere` are the demands it takes over from the trade before its own."""
    own = read_demands(top)
    kept = tuple(demand for demand in everywhere if demand.key not in {line.key for line in own})
    units: Units = top.word("units", Units)
    paper: Paper = top.word("paper", Paper)
    closing: Closing = top.word("closing", Closing)
    found = Jurisdiction(
        key=top.text("key"),
        title=top.text("title"),
        authority=top.text("authority"),
        units=units,
        paper=paper,
        papers=_papers(top),
        language=top.text("language"),
        words=MappingProxyType(top.pairs("words")),
        share=_read_share(top.table("share")),
        closing=closing,
        closing_reason=top.text("closing_reason"),
        class_a_signer=top.text("class_a_signer"),
        builder_may_countersign=top.yes("builder_may_countersign"),
        leave_out=top.texts("leave_out"),
        occupant_notes=top.texts("occupant_notes"),
        demands=kept + own,
        caution=top.text("caution"),
        source_checked_on=top.day("source_checked_on"),
        template=top.yes("template"),
    )
    top.done()
    if paper not in found.papers:
        raise top.wrong("'paper' must be one of 'papers'")
    return found


def _papers(top: Table) -> tuple[Paper, ...]:
    found: list[Paper] = []
    for paper in top.texts("papers"):
        if paper == "a4":
            found.append("a4")
        elif paper == "letter":
            found.append("letter")
        else:
            raise top.wrong(f"'papers' holds '{paper}', which is no paper size")
    return tuple(found)


def _read_share(table: Table) -> ShareRule:
    grade: Grade = table.word("grade", Grade)
    share = ShareRule(
        basis=table.word("basis", ShareRule.__annotations__["basis"]),
        majority=table.text("majority"),
        text=table.text("text"),
        grade=grade,
        source=table.text("source", ""),
        edition=table.text("edition", ""),
    )
    table.done()
    return share
