"""The Bench, tasks and clocks."""

from uuid import UUID, uuid4

from django.http import HttpRequest, HttpResponse
from django.shortcuts import get_object_or_404
from django.urls import reverse
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.shop import actions, queries
from buildlog.shop.forms import TaskForm
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.forms import run_posted
from buildlog.web.pages import see_other, show


@aircraft_view(read=Act.COMMENT)
def bench(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the running clock, the last task, today's entries and drafts."""
    views = queries.task_views(aircraft)
    clock = queries.clock_of(request.user)
    context = {
        "clock": clock,
        "ran": int((timezone.now() - clock.started_at).total_seconds() // 60) if clock else 0,
        "last": queries.last_task(aircraft, request.user),
        "drafts": queries.drafts_of(aircraft, request.user),
        "today": queries.whole(aircraft.entries.filter(worked_on=timezone.localdate())).order_by("-saved_at")[:10],
        "in_work": [view for view in views if view.state == "in-work"][:6],
        "next": [view for view in views if view.state == "to-do"][:3],
    }
    return show(request, "shop/bench.html", context)


@aircraft_view(chapter="log")
def tasks(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the tasks by section."""
    words, state = request.GET.get("q", "").strip().lower()[:100], request.GET.get("state", "")
    every = queries.task_views(aircraft)
    found = [
        view
        for view in every
        if (not state or view.state == state) and words in f"{view.task.number} {view.task.title}".lower()
    ]
    sections = [one for one in queries.section_views(aircraft, found) if one.tasks or not (words or state)]
    states = ("to-do", "in-work", "waiting", "done", "not-needed")
    counts = [(one, sum(view.state == one for view in every)) for one in states]
    context = {"sections": sections, "q": words, "state_asked": state, "counts": counts, "all": len(every)}
    return show(request, "shop/tasks.html", context)


@aircraft_view(chapter="log")
def task_page(request: HttpRequest, aircraft: Aircraft, task_id: UUID) -> HttpResponse:
    """Show one task with its entries."""
    task = get_object_or_404(aircraft.tasks.select_related("section", "zone"), id=task_id)
    view = next(view for view in queries.task_views(aircraft) if view.task.id == task.id)
    context = {"task": task, "view": view, "entries": queries.of_task(task.id, aircraft)}
    return show(request, "shop/task_page.html", context)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def task_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Plan a task."""
    form = TaskForm(request.POST or None, aircraft=aircraft, initial={"section": request.GET.get("section")})
    if task := run_posted(request, form, actions.add_task, aircraft=aircraft, by=request.user, client_id=uuid4()):
        return see_other("task-page", aircraft.id, task.id)
    context = {"form": form, "heading": "Plan a task", "sections": aircraft.sections.exists()}
    return show(request, "shop/task_edit.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def task_edit(request: AircraftRequest, aircraft: Aircraft, task_id: UUID) -> HttpResponse:
    """Change what a task says."""
    task = get_object_or_404(aircraft.tasks.select_related("section", "zone"), id=task_id)
    first = {name: getattr(task, name) for name in TaskForm.base_fields if name != "planned"}
    first["planned"] = f"{task.planned_minutes / 60:g}" if task.planned_minutes else ""
    form = TaskForm(request.POST or None, aircraft=aircraft, initial=first)
    if run_posted(request, form, actions.change_task, aircraft=aircraft, by=request.user, task=task):
        return see_other("task-page", aircraft.id, task.id)
    context = {"form": form, "heading": f"Change task {task.number}", "sections": True}
    return show(request, "shop/task_edit.html", context, status=422 if form.errors else 200)


@aircraft_view(read=None, write=Act.LOG)
def clock_start(request: AircraftRequest, aircraft: Aircraft, task_id: UUID) -> HttpResponse:
    """Start one's own clock on a task."""
    actions.start_clock(by=request.user, task=get_object_or_404(aircraft.tasks, id=task_id))
    return see_other("bench", aircraft.id)


@aircraft_view(read=None, write=Act.LOG)
def clock_stop(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Stop one's own clock and go on to the log with its minutes."""
    stopped = actions.stop_clock(by=request.user)
    answer = see_other("entry-add", aircraft.id)
    if stopped:
        task, minutes = stopped
        answer["Location"] = f"{reverse('entry-add', args=[aircraft.id])}?task={task.id}&minutes={minutes}"
    return answer
