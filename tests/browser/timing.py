"""How long a picture takes from the key press to the screen, and bursts of key presses."""

from statistics import median

from playwright.sync_api import Locator, Page

__all__ = ["burst_of_keys", "median_ms_to_picture"]

# from the key's own event until the picture that follows is decoded and a frame has been drawn
_WATCH = """root => {
    window.watched = new Promise(resolve => {
        let pressed = null;
        window.addEventListener(
            'keydown', () => { pressed = performance.now(); }, {capture: true, once: true});
        const observer = new MutationObserver(() => {
            const picture = root.matches('img') ? root : root.querySelector('img');
            if (pressed === null || !picture) return;
            observer.disconnect();
            picture.decode().catch(() => null).then(() => requestAnimationFrame(
                () => setTimeout(() => resolve(performance.now() - pressed), 0)));
        });
        observer.observe(
            root, {attributes: true, attributeFilter: ['src'], childList: true, subtree: true});
    });
}"""

_BURST = """async (handle, [key, times, gap]) => {
    for (let press = 0; press < times; press += 1) {
        handle.dispatchEvent(new KeyboardEvent('keydown', {key, bubbles: true}));
        await new Promise(done => setTimeout(done, gap));
    }
}"""


def median_ms_to_picture(page: Page, handle: Locator, picture: Locator, keys: list[str]) -> float:
    """Median time from a key press on a slider to the redrawn picture, in milliseconds.

    Parameters
    ----------
    handle
        The slider's knob.
    picture
        The `img`, or what holds it if it is replaced as a whole.
    keys
        Pressed one after the other, each after the picture of the last has come; each must
        change the picture.
    """
    took = []
    handle.focus()
    for key in keys:
        picture.evaluate(_WATCH)
        page.keyboard.press(key)
        took.append(float(page.evaluate("window.watched")))
    return median(took)


def burst_of_keys(handle: Locator, key: str, times: int, gap_ms: int) -> None:
    """Key events on a slider's knob in quick succession, as a held key sends them."""
    handle.focus()
    handle.evaluate(_BURST, [key, times, gap_ms])
