"""The one error that a person may see: a rule of the record was not met."""


class Refused(Exception):
    """A rule says no. `text` is a sentence for the person, `field` the form field it belongs to."""

    def __init__(self, text: str, *, field: str | None = None) -> None:
        super().__init__(text)
        self.text = text
        self.field = field
