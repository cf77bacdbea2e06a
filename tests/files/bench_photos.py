"""How long one photo of 12 megapixels takes to be kept, in ms: `python -m tests.files.bench_photos [count]`.

Not collected by pytest: it measures, it asserts nothing. The pictures are made before the clock runs.
"""

import os
import statistics
import sys
import tempfile
import time

COUNT = int(sys.argv[1]) if len(sys.argv) > 1 else 12


def main() -> None:
    """Print the median and the extremes of whole intakes, wall clock and CPU of this and the decoding process."""
    os.environ["BUILDLOG_DATA"] = tempfile.mkdtemp(prefix="bench-")
    os.environ["DJANGO_SETTINGS_MODULE"] = "buildlog.settings"
    import django
    from django.core.management import call_command

    django.setup()
    call_command("migrate", verbosity=0)
    from tests import make
    from tests.makers.files import photo, shop_jpeg

    aircraft = make.aircraft()
    pictures = [shop_jpeg() for _ in range(COUNT)]
    walls = []
    for content in pictures:
        begun = time.perf_counter()
        photo(aircraft=aircraft, content=content)
        walls.append((time.perf_counter() - begun) * 1000)
    size = statistics.mean(len(content) for content in pictures) / 1e6
    spent = os.times()
    cpu = spent.children_user + spent.children_system
    print(f"{COUNT} JPEGs of 12 MP, {size:.1f} MB each")
    print(f"wall {statistics.median(walls):.0f} ms each (least {min(walls):.0f}, most {max(walls):.0f})")
    print(f"CPU of the decoding process {cpu / COUNT * 1000:.0f} ms each")


if __name__ == "__main__":
    main()
