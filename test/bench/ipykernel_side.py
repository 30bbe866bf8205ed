"""Times of ipykernel as JSON: start to first reply, start to first result, a warm round trip. Arguments: starts, trips."""
import json
import statistics
import sys
import time

from jupyter_client.manager import KernelManager


def answer(client, request):
    """Waits for the shell reply and for the kernel's idle state after it."""
    while client.get_shell_msg(timeout=60)["parent_header"].get("msg_id") != request:
        pass
    while True:
        message = client.get_iopub_msg(timeout=60)
        if message["parent_header"].get("msg_id") == request and message["content"].get("execution_state") == "idle":
            return


def once(trips):
    manager = KernelManager(kernel_name="python3")
    start = time.perf_counter()
    manager.start_kernel()
    client = manager.client()
    client.start_channels(hb=False, stdin=False)
    request = client.kernel_info()
    while client.get_shell_msg(timeout=60)["parent_header"].get("msg_id") != request:
        pass
    reply = time.perf_counter() - start
    answer(client, client.execute("1+1"))
    result = time.perf_counter() - start
    times = []
    for _ in range(trips):
        began = time.perf_counter()
        answer(client, client.execute("1+1"))
        times.append(time.perf_counter() - began)
    client.stop_channels()
    manager.shutdown_kernel(now=True)
    return {"reply": reply, "result": result, "trip": statistics.median(times)}


print(json.dumps([once(int(sys.argv[2])) for _ in range(int(sys.argv[1]))]))
