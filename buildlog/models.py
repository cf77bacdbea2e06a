"""All tables of the one app; each stands in the room it belongs to."""

from buildlog.aircraft.models import *  # noqa: F403
from buildlog.binder.models import *  # noqa: F403
from buildlog.calcs.models import *  # noqa: F403
from buildlog.conformity.models import *  # noqa: F403
from buildlog.files.models import *  # noqa: F403
from buildlog.ledger.models import *  # noqa: F403
from buildlog.parts.models import *  # noqa: F403
from buildlog.readings.models import *  # noqa: F403
from buildlog.shop.models import *  # noqa: F403
from buildlog.trials.models import *  # noqa: F403
from buildlog.weighing.models import *  # noqa: F403
