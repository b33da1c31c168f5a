"""Writing a file so that at every moment either the old one or the new one is whole on disk."""

import os
import tempfile
from contextlib import suppress
from pathlib import Path


def write_atomically(path: Path, data: bytes) -> None:
    """Write beside the target, flush to disk, then replace. Raises OSError; leaves no remains.

    An existing file keeps its permissions; a symbolic link keeps pointing, its target is replaced.
    What is no ordinary file, such as a pipe or a terminal, is written to as it is.
    """
    target = Path(os.path.realpath(path))
    if target.exists() and not target.is_file():
        target.write_bytes(data)
        return
    handle, name = tempfile.mkstemp(prefix=".groundcourse-", suffix=".part", dir=target.parent)
    part = Path(name)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(data)
            file.flush()
            os.fsync(file.fileno())
        part.chmod(target.stat().st_mode & 0o777 if target.exists() else 0o666 & ~_umask())
        part.replace(target)
    except BaseException:
        part.unlink(missing_ok=True)
        raise
    _sync_folder(target.parent)


def _umask() -> int:
    mask = os.umask(0)
    os.umask(mask)
    return mask


def _sync_folder(folder: Path) -> None:
    """Make the rename itself durable, where the system can; the file is whole in any case."""
    if not hasattr(os, "O_DIRECTORY"):
        return
    with suppress(OSError):
        handle = os.open(folder, os.O_RDONLY | os.O_DIRECTORY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)
