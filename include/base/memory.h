/* Memory that is there or the program ends.
 *
 * Out of memory is not an error a caller can mend: the allocators report it
 * on standard error and exit with status 70.  An open store transaction is
 * rolled back by SQLite when the file is next opened.
 *
 * An arena hands out pieces that live until it is reset or released, all at
 * once; the pieces are zeroed and aligned for any type. */
#ifndef SL_BASE_MEMORY_H
#define SL_BASE_MEMORY_H

#include <stddef.h>

/* `count` zeroed items of `size` bytes; never NULL. */
void *sl_new(size_t count, size_t size);

/* `items` grown so that at least `wanted` of `size` bytes fit; *capacity is
 * the number that fit and is raised by doubling.  The new part is not
 * zeroed.  Release with free(). */
void *sl_grow(void *items, size_t *capacity, size_t wanted, size_t size);

struct sl_arena_block;

struct sl_arena {
    struct sl_arena_block *blocks;
};

/* A zeroed struct sl_arena is ready for use. */
void *sl_arena_new(struct sl_arena *arena, size_t count, size_t size);
/* A copy of `length` bytes with a NUL after them. */
char *sl_arena_text(struct sl_arena *arena, const char *bytes, size_t length);
/* Forget all pieces but keep one block for reuse. */
void sl_arena_reset(struct sl_arena *arena);
void sl_arena_release(struct sl_arena *arena);

#endif
