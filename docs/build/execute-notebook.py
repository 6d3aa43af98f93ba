"""Runs one notebook in the Deno kernel: JSON on standard input, JSON with fresh outputs on standard output.

usage: /usr/bin/python3 execute-notebook.py FOLDER < notebook.ipynb

Listens to the kernel itself and a little longer than it says it is busy: the Deno kernel may report that
it is idle before it sends a cell's result, and a client that stops there loses it.
"""
import json
import queue
import sys

import nbformat
from jupyter_client.manager import start_new_kernel

LINGER = 0.6  # seconds to wait for output after the kernel reports that it is idle
PATIENCE = 300  # seconds that a cell may be silent


def outputs_of(client, source):
    """Runs one cell and returns its outputs; an error ends the program."""
    request = client.execute(source)
    outputs, idle = [], False
    while True:
        try:
            message = client.get_iopub_msg(timeout=LINGER if idle else PATIENCE)
        except queue.Empty:
            if idle:
                return outputs
            raise
        if message["parent_header"].get("msg_id") != request:
            continue
        kind, content = message["msg_type"], message["content"]
        if kind == "status":
            idle = content["execution_state"] == "idle"
        elif kind == "error":
            raise SystemExit(f"{source}\n{content['ename']}: {content['evalue']}")
        elif kind == "stream" and outputs and outputs[-1].get("name") == content["name"]:
            outputs[-1].text += content["text"]
        elif kind in ("stream", "display_data", "execute_result"):
            outputs.append(nbformat.v4.output_from_msg(message))


notebook = nbformat.reads(sys.stdin.read(), as_version=4)
manager, client = start_new_kernel(kernel_name="deno", cwd=sys.argv[1], startup_timeout=120)
try:
    for cell in notebook.cells:
        if cell.cell_type == "code":
            cell.outputs = outputs_of(client, cell.source)
finally:
    client.stop_channels()
    manager.shutdown_kernel(now=True)
json.dump(notebook, sys.stdout)
