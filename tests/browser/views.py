"""A view in the page: where its parts are, and what a person does with them."""

from typing import Literal

from playwright.sync_api import Locator, Page

from tests.browser.reading import eventually

__all__ = ["ViewOnPage"]

Kind = Literal["odds", "curve", "profile", "effects", "change", "pair", "soundness"]


class ViewOnPage:
    """One view in an open notebook."""

    def __init__(self, page: Page, kind: Kind, occurrence: int = 0) -> None:
        self.page = page
        self.root = page.locator(f".plainodds-view.plainodds-{kind}").nth(occurrence)

    def control(self, field: str) -> Locator:
        """The control that edits a field, for example a predictor's name or "level"."""
        return self.root.locator(f".plainodds-control-{field}")

    def handle(self, field: str) -> Locator:
        """The knob of a field's slider."""
        return self.control(field).locator(".noUi-handle")

    def box(self, field: str) -> Locator:
        """The box for a field's number."""
        return self.control(field).locator("input").first

    def enter(self, field: str, number: str) -> None:
        """Type a number into a field's box, see it there, and press Enter.

        On a busy machine a box that was put back may be written once more while the next
        number is typed, faster than anybody types.
        """
        box = self.box(field)

        def typed() -> None:
            box.fill(number)
            self.page.wait_for_timeout(100)
            assert box.input_value() == number

        eventually(self.page, typed)
        box.press("Enter")

    def choose(self, field: str, label: str) -> None:
        """Choose from a field's drop-down."""
        self.control(field).locator("select").select_option(label=label)

    def chosen(self, field: str) -> str:
        """What a field's drop-down shows."""
        shown = self.control(field).locator("select")
        text = str(shown.evaluate("select => select.options[select.selectedIndex].text"))
        # drop-downs are written with spaces that do not break
        return text.replace("\N{NO-BREAK SPACE}", " ")

    def button(self, name: str) -> Locator:
        """A button by what is written on it."""
        return self.root.get_by_role("button", name=name, exact=True)

    @property
    def picture(self) -> Locator:
        """The picture itself."""
        return self.root.locator(".plainodds-picture img")

    @property
    def words(self) -> Locator:
        """The sentences and cautions."""
        return self.root.locator(".plainodds-words")

    @property
    def table(self) -> Locator:
        """The answer's table."""
        return self.root.locator(".plainodds-table")

    @property
    def code(self) -> Locator:
        """The call that gives the answer again."""
        return self.root.locator(".plainodds-code pre")

    @property
    def problem(self) -> Locator:
        """Where an error of a callback is shown."""
        return self.root.locator(".plainodds-problem")

    @property
    def save(self) -> Locator:
        """The button that writes the picture's file, and its kinds."""
        return self.root.locator(".plainodds-save")

    @property
    def saved(self) -> Locator:
        """Where the file was written."""
        return self.root.locator(".plainodds-saved")
