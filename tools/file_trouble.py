"""What a tool says of a file it cannot use."""


class FileTrouble(Exception):
    """`status` is palier's exit status: 2 the file holds something else, 4 it cannot be read or written."""

    def __init__(self, path, cause, status):
        super().__init__(f"{path}: {cause}")
        self.status = status
