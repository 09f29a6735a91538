#include "base/memory.h"

#include <stdalign.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

/* One block serves a whole ordinary station; larger pieces get their own. */
#define BLOCK_BYTES ((size_t)64 * 1024)
#define EXIT_OUT_OF_MEMORY 70

struct sl_arena_block {
    struct sl_arena_block *next;
    size_t used;
    size_t size;
    alignas(max_align_t) unsigned char bytes[];
};

static _Noreturn void out_of_memory(void)
{
    fputs("summerlow: out of memory; nothing was changed\n", stderr);
    exit(EXIT_OUT_OF_MEMORY);
}

void *sl_new(size_t count, size_t size)
{
    void *items = calloc(count ? count : 1, size);

    if (!items)
        out_of_memory();
    return items;
}

void *sl_grow(void *items, size_t *capacity, size_t wanted, size_t size)
{
    size_t larger = *capacity ? *capacity : 16;
    void *grown;

    if (wanted <= *capacity)
        return items;
    while (larger < wanted) {
        if (larger > SIZE_MAX / 2)
            out_of_memory();
        larger *= 2;
    }
    if (larger > SIZE_MAX / size)
        out_of_memory();
    grown = realloc(items, larger * size);
    if (!grown)
        out_of_memory();
    *capacity = larger;
    return grown;
}

static struct sl_arena_block *block_new(size_t size)
{
    struct sl_arena_block *block = malloc(sizeof *block + size);

    if (!block)
        out_of_memory();
    block->next = NULL;
    block->used = 0;
    block->size = size;
    return block;
}

void *sl_arena_new(struct sl_arena *arena, size_t count, size_t size)
{
    struct sl_arena_block *block = arena->blocks;
    size_t align = alignof(max_align_t);
    size_t bytes;
    void *piece;

    if (size && count > (SIZE_MAX - BLOCK_BYTES) / size)
        out_of_memory();
    bytes = (count * size + align - 1) / align * align;
    if (!block || block->size - block->used < bytes) {
        block = block_new(bytes > BLOCK_BYTES ? bytes : BLOCK_BYTES);
        block->next = arena->blocks;
        arena->blocks = block;
    }
    piece = block->bytes + block->used;
    block->used += bytes;
    return memset(piece, 0, bytes);
}

char *sl_arena_text(struct sl_arena *arena, const char *bytes, size_t length)
{
    char *copy = sl_arena_new(arena, length + 1, 1);

    memcpy(copy, bytes, length);
    return copy;
}

void sl_arena_reset(struct sl_arena *arena)
{
    struct sl_arena_block *kept = arena->blocks;

    if (!kept)
        return;
    arena->blocks = kept->next;
    sl_arena_release(arena);
    kept->next = NULL;
    kept->used = 0;
    arena->blocks = kept;
}

void sl_arena_release(struct sl_arena *arena)
{
    while (arena->blocks) {
        struct sl_arena_block *next = arena->blocks->next;

        free(arena->blocks);
        arena->blocks = next;
    }
}
