"""Pages of this room."""

from django.urls import path

from buildlog.shop.views import entries, tasks

urlpatterns = [
    path("", tasks.bench, name="bench"),
    path("log/", entries.entry_add, name="entry-add"),
    path("entries/", entries.entries, name="entries"),
    path("entries/<uuid:entry_id>/", entries.entry_page, name="entry-page"),
    path("entries/<uuid:entry_id>/edit/", entries.entry_edit, name="entry-edit"),
    path("entries/<uuid:entry_id>/close/", entries.entry_close, name="entry-close"),
    path("entries/<uuid:entry_id>/amend/", entries.entry_amend, name="entry-amend"),
    path("tasks/", tasks.tasks, name="tasks"),
    path("tasks/add/", tasks.task_add, name="task-add"),
    path("tasks/<uuid:task_id>/", tasks.task_page, name="task-page"),
    path("tasks/<uuid:task_id>/edit/", tasks.task_edit, name="task-edit"),
    path("tasks/<uuid:task_id>/clock/", tasks.clock_start, name="clock-start"),
    path("clock/stop/", tasks.clock_stop, name="clock-stop"),
]
