"""Where a view's parts are in the page: the classes that views carry for this purpose."""

from typing import Literal

from playwright.sync_api import Locator, Page

__all__ = ["ViewOnPage"]


class ViewOnPage:
    """One OddsView, CurveView or ProfileView in an open notebook."""

    def __init__(
        self, page: Page, name: Literal["odds", "curve", "profile"], occurrence: int = 0
    ) -> None:
        self.root = page.locator(f".plainodds-{name}").nth(occurrence)

    def control(self, field: str) -> Locator:
        """The control that edits a field, for example a predictor's name or "level"."""
        return self.root.locator(f".plainodds-control-{field}")

    def handle(self, field: str) -> Locator:
        """The knob of a field's slider."""
        return self.control(field).locator(".noUi-handle")

    @property
    def picture(self) -> Locator:
        """The picture itself."""
        return self.root.locator(".plainodds-picture img").first

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
        return self.root.locator(".plainodds-code")

    @property
    def problem(self) -> Locator:
        """Where an error of a callback is shown."""
        return self.root.locator(".plainodds-problem")

    @property
    def save(self) -> Locator:
        """The buttons that write the figure's files."""
        return self.root.locator(".plainodds-save")
