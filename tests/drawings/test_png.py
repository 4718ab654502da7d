import io

import numpy as np
import pytest
from PIL import Image

from plainodds.drawings.png import png_of


@pytest.mark.parametrize("shape", [(1, 1), (3, 7), (50, 20)])
def test_what_is_written_is_read_back(shape):
    pixels = np.random.default_rng(1).integers(0, 256, (*shape, 4), dtype=np.uint8)
    image = Image.open(io.BytesIO(png_of(pixels)))
    assert image.mode == "RGBA"
    assert (np.asarray(image) == pixels).all()
