"""The demo's photos: real JPEG files as a phone writes them, each another picture, and the same one every time."""

from dataclasses import replace
from io import BytesIO

import pytest
from PIL import ExifTags, Image, ImageStat

from buildlog.demo.pictures import draw_photo, drawing
from buildlog.demo.scenes import SCENES
from buildlog.demo.story import read_story


@pytest.fixture(scope="module")
def specs():
    """Return the first photo of the story for every scene."""
    first = {}
    for snap in read_story().snaps.values():
        first.setdefault(snap.spec.scene, snap.spec)
    return list(first.values())


@pytest.fixture(scope="module")
def drawn(specs):
    """Return the bytes of one photo for every scene, drawn as the load draws them."""
    with drawing(specs) as coming:
        return {spec.scene: (spec, coming[spec.key].result()) for spec in specs}


@pytest.mark.parametrize("scene", sorted(SCENES))
def test_a_photo_is_a_large_jpeg_with_the_cameras_time(drawn, scene):
    spec, data = drawn[scene]
    with Image.open(BytesIO(data)) as picture:
        picture.load()
        exif = picture.getexif()
        assert picture.format == "JPEG"
        assert sorted(picture.size) == [1200, 1600]
        assert exif[ExifTags.Base.Model] == spec.camera != ""
        taken = exif.get_ifd(ExifTags.IFD.Exif)[ExifTags.Base.DateTimeOriginal]
        assert taken == f"{spec.taken:%Y:%m:%d %H:%M:%S}"
        spread = ImageStat.Stat(picture.convert("L")).stddev[0]
    assert spread > 10, "a photo of one grey"
    assert 80_000 < len(data) < 600_000


def test_every_scene_gives_another_picture(drawn):
    assert len({data for _, data in drawn.values()}) == len(SCENES)


def test_the_same_description_gives_the_same_bytes_and_another_one_does_not(drawn):
    spec, data = drawn["label"]
    assert draw_photo(spec) == data
    assert draw_photo(replace(spec, key="another")) != data


def test_a_photo_held_sideways_says_so_and_is_upright_when_turned(specs):
    sideways = [snap.spec for snap in read_story().snaps.values() if snap.spec.orientation != 1]
    assert len(sideways) >= 2
    with Image.open(BytesIO(draw_photo(sideways[0]))) as picture:
        assert picture.getexif()[ExifTags.Base.Orientation] == sideways[0].orientation
        assert picture.size == (1600, 1200)


def test_a_camera_without_a_clock_leaves_no_time(specs):
    with Image.open(BytesIO(draw_photo(replace(specs[0], camera="")))) as picture:
        assert ExifTags.Base.DateTimeOriginal not in picture.getexif().get_ifd(ExifTags.IFD.Exif)
