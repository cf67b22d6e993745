/* Faults under the program's own writer, at the n-th call that changes the record's files.

   Preloaded into a process (LD_PRELOAD); armed and disarmed from Python by `shim_arm`. Only files
   below one folder count. What a fault does:
     0 only count                     4 every call from the n-th fails with EIO
     1 killed before the call         5 the n-th call fails with ENOSPC
     2 half the write, then killed    6 every call from the n-th that needs room fails with ENOSPC
     3 the n-th call fails with EIO                                                              */

#define _GNU_SOURCE
#include <dlfcn.h>
#include <errno.h>
#include <fcntl.h>
#include <limits.h>
#include <signal.h>
#include <stdarg.h>
#include <stdio.h>
#include <string.h>
#include <sys/types.h>
#include <unistd.h>

static char folder[PATH_MAX];
static size_t folder_length = 0;
static int armed = 0;
static int mode = 0;
static long at = 0;
static long calls = 0;

void shim_arm(const char *below, int what, long nth) {
    strncpy(folder, below, sizeof folder - 1);
    folder_length = strlen(folder);
    mode = what;
    at = nth;
    calls = 0;
    armed = 1;
}

long shim_disarm(void) {
    armed = 0;
    return calls;
}

static int ours(const char *path) {
    return strncmp(path, folder, folder_length) == 0;
}

static int ours_open(int fd) {
    char link[64], path[PATH_MAX];
    snprintf(link, sizeof link, "/proc/self/fd/%d", fd);
    ssize_t length = readlink(link, path, sizeof path - 1);
    if (length < 0)
        return 0;
    path[length] = 0;
    return ours(path);
}

/* 1 where the call is to fail; errno is set. `takes_room`: whether a full disk refuses it. */
static int fails(int takes_room) {
    calls++;
    if (calls < at || mode == 0)
        return 0;
    if (calls > at && mode != 4 && mode != 6)
        return 0;
    if (mode == 1)
        kill(getpid(), SIGKILL);
    if (mode == 3 || mode == 4) {
        errno = EIO;
        return 1;
    }
    if ((mode == 5 || mode == 6) && takes_room) {
        errno = ENOSPC;
        return 1;
    }
    return 0;
}

static int tears(void) {
    return mode == 2 && calls == at;
}

#define REAL(name) \
    static __typeof__(&name) real = 0; \
    if (!real) real = (__typeof__(&name))dlsym(RTLD_NEXT, #name)

ssize_t write(int fd, const void *bytes, size_t count) {
    REAL(write);
    if (armed && ours_open(fd)) {
        if (fails(1))
            return -1;
        if (tears()) {
            real(fd, bytes, count / 2);
            kill(getpid(), SIGKILL);
        }
    }
    return real(fd, bytes, count);
}

ssize_t pwrite(int fd, const void *bytes, size_t count, off_t place) {
    REAL(pwrite);
    if (armed && ours_open(fd)) {
        if (fails(1))
            return -1;
        if (tears()) {
            real(fd, bytes, count / 2, place);
            kill(getpid(), SIGKILL);
        }
    }
    return real(fd, bytes, count, place);
}

ssize_t pwrite64(int fd, const void *bytes, size_t count, off64_t place) {
    REAL(pwrite64);
    if (armed && ours_open(fd)) {
        if (fails(1))
            return -1;
        if (tears()) {
            real(fd, bytes, count / 2, place);
            kill(getpid(), SIGKILL);
        }
    }
    return real(fd, bytes, count, place);
}

#define ON_OPEN_FILE(name, arguments, call) \
    int name arguments { \
        REAL(name); \
        if (armed && ours_open(fd)) { \
            if (fails(0)) \
                return -1; \
            if (tears()) \
                kill(getpid(), SIGKILL); \
        } \
        return real call; \
    }

ON_OPEN_FILE(fsync, (int fd), (fd))
ON_OPEN_FILE(fdatasync, (int fd), (fd))
ON_OPEN_FILE(ftruncate, (int fd, off_t size), (fd, size))
ON_OPEN_FILE(ftruncate64, (int fd, off64_t size), (fd, size))

int unlink(const char *path) {
    REAL(unlink);
    if (armed && ours(path)) {
        if (fails(0))
            return -1;
        if (tears())
            kill(getpid(), SIGKILL);
    }
    return real(path);
}

/* Opening counts only where it makes a file: the rollback journal. A full disk has room for a name. */
#define ON_OPENING(name) \
    int name(const char *path, int flags, ...) { \
        REAL(name); \
        mode_t rights = 0; \
        if (flags & O_CREAT) { \
            va_list more; \
            va_start(more, flags); \
            rights = va_arg(more, mode_t); \
            va_end(more); \
            if (armed && ours(path)) { \
                if (fails(0)) \
                    return -1; \
                if (tears()) \
                    kill(getpid(), SIGKILL); \
            } \
        } \
        return real(path, flags, rights); \
    }

ON_OPENING(open)
ON_OPENING(open64)
