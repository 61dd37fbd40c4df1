"""Makes a named pipe, which Node.js cannot."""

import os
import sys

os.mkfifo(sys.argv[1])
