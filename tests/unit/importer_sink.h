/* A sink that writes down all it is told, for the importer's tests. */
#ifndef SL_TESTS_IMPORTER_SINK_H
#define SL_TESTS_IMPORTER_SINK_H

#include <stdio.h>
#include <string.h>

#include "base/text.h"
#include "importer/inventory.h"

/* A year later than this is doubted. */
#define IMPORT_YEAR 2026

/* What to answer to the record at a line of a kind; all others are kept. */
struct script {
    enum sl_kind kind;
    long line;
    struct sl_answer answer;
};

struct listener {
    struct sl_text heard;
    const struct script *script;
    size_t script_count;
    const struct sl_recall *recalls;
    size_t recall_count;
    size_t recalled;
    long records;  /* handed over */
    long findings; /* told */
    long aside;
    long progress;
    long stop_at;       /* progress answers false at this call; 0: never */
    long fail_record;   /* the record at this call fails; 0: never */
    const char *change; /* a file to append to at the first record */
};

static const char *const fittings[] = {
    "bellmouth entrance",
    "rounded entrance",
    "flush entrance",
    "projecting entrance",
    "90 elbow, standard",
    "90 elbow, long radius",
    "45 elbow",
    "mitre 90",
    "mitre 60",
    "mitre 45",
    "mitre 30",
    "tee, run",
    "tee, branch",
    "wye 45",
    "concentric reducer",
    "eccentric reducer",
    "gate valve",
    "butterfly valve",
    "ball valve",
    "eccentric plug valve",
    "eccentric plug valve, full bore",
    "swing check valve",
    "knife gate valve",
    "foot valve",
    "basket strainer",
    "exit",
};
static const char *const materials[] = {
    "smooth plastic",
    "lined metal",
    "uncoated steel",
    "coated steel",
    "rusty steel",
    "galvanised iron",
    "uncoated cast iron",
    "tuberculated main, slight",
    "tuberculated main, moderate",
    "tuberculated main, appreciable",
    "tuberculated main, severe",
    "prestressed concrete",
    "precast concrete",
    "PVC, cemented joints",
    "PVC, ring joints",
    "GRP",
    "slimed concrete",
};

#define COUNT(list) (sizeof(list) / sizeof((list)[0]))

/* The vocabularies with the materials and fittings of the K table. */
static inline struct sl_vocabularies test_vocabularies(void)
{
    struct sl_vocabularies words = sl_fixed_vocabularies();

    words.of[SL_WORDS_MATERIAL] =
        (struct sl_words){materials, COUNT(materials)};
    words.of[SL_WORDS_FITTING] = (struct sl_words){fittings, COUNT(fittings)};
    return words;
}

static inline void write_field(struct sl_text *heard,
                               const struct sl_field *field, const void *record)
{
    union sl_record copy;
    struct sl_vocabularies words = test_vocabularies();
    const struct sl_number *number;
    const char *text;

    memcpy(&copy, record, sizeof copy);
    switch (field->type) {
    case SL_FIELD_TEXT:
        text = *sl_field_text(field, &copy);
        if (text)
            sl_text_addf(heard, " %s=\"%s\"", field->name, text);
        break;
    case SL_FIELD_WORD:
        if (*sl_field_word(field, &copy))
            sl_text_addf(heard, " %s=%s", field->name,
                         sl_word(&words.of[field->vocabulary],
                                 *sl_field_word(field, &copy)));
        break;
    case SL_FIELD_NUMBER:
    case SL_FIELD_WHOLE:
        number = sl_field_number(field, &copy);
        if (number->known)
            sl_text_addf(heard, " %s=%.9g", field->name, number->value);
        if (number->grade)
            sl_text_addf(heard, " %s_grade=%c", field->name, number->grade);
        break;
    }
}

/* Raw text so that every byte can be seen. */
static inline void write_raw(struct sl_text *heard, const char *raw,
                             size_t length)
{
    for (size_t i = 0; i < length && i < 200; i++) {
        unsigned char c = (unsigned char)raw[i];

        if (c == '\n')
            sl_text_add_string(heard, "\\n");
        else if (c == '\r')
            sl_text_add_string(heard, "\\r");
        else if (c < 0x20 || c >= 0x7F)
            sl_text_addf(heard, "\\x%02X", c);
        else
            sl_text_add(heard, raw + i, 1);
    }
    if (length > 200)
        sl_text_addf(heard, "... %zu bytes", length);
}

static inline void append(const char *path)
{
    FILE *stream = fopen(path, "ab");

    if (!stream)
        return;
    fputs("X,Y\n", stream);
    fclose(stream);
}

static inline enum sl_status hear_record(void *context, enum sl_kind kind,
                                         const void *record,
                                         struct sl_answer *answer,
                                         struct sl_error *error)
{
    struct listener *listener = context;
    const struct sl_record_kind *about = sl_record_kind(kind);
    union sl_record copy = {0};

    if (++listener->records == listener->fail_record)
        return sl_error_set(error, SL_STORE, "the store is full");
    if (listener->change && listener->records == 1)
        append(listener->change);
    memcpy(&copy, record, about->size);
    sl_text_addf(&listener->heard, "record %s:%ld", about->file,
                 copy.station.line);
    for (size_t i = 0; i < about->field_count; i++)
        write_field(&listener->heard, &about->fields[i], &copy);
    sl_text_add_string(&listener->heard, "\n");
    for (size_t i = 0; i < listener->script_count; i++)
        if (listener->script[i].kind == kind &&
            listener->script[i].line == copy.station.line)
            *answer = listener->script[i].answer;
    return SL_OK;
}

static inline enum sl_status
hear_aside(void *context, const struct sl_aside *aside, struct sl_error *error)
{
    struct listener *listener = context;

    (void)error;
    listener->aside++;
    sl_text_addf(&listener->heard, "%s %s:%ld \"%s\"",
                 sl_fate_name(aside->fate), sl_record_kind(aside->kind)->file,
                 aside->line, aside->record_id);
    if (aside->station_id[0])
        sl_text_addf(&listener->heard, " of \"%s\"", aside->station_id);
    sl_text_addf(&listener->heard, ": %s\n    raw ", aside->reason);
    write_raw(&listener->heard, aside->raw, aside->raw_length);
    sl_text_add_string(&listener->heard, "\n");
    return SL_OK;
}

static inline enum sl_status hear_recall(void *context,
                                         struct sl_recall *recall, bool *found,
                                         struct sl_error *error)
{
    struct listener *listener = context;

    (void)error;
    *found = listener->recalled < listener->recall_count;
    if (*found)
        *recall = listener->recalls[listener->recalled++];
    return SL_OK;
}

static inline enum sl_status hear_finding(void *context,
                                          const struct sl_finding *finding,
                                          struct sl_error *error)
{
    struct listener *listener = context;

    (void)error;
    listener->findings++;
    sl_text_addf(&listener->heard,
                 "%s %s:%ld %s column \"%s\" of \"%s\" value \"%s\"\n"
                 "    %s\n    %s\n",
                 sl_severity_name(finding->severity), finding->file,
                 finding->line, finding->code, finding->column,
                 finding->record_id, finding->value, finding->reason,
                 finding->remedy);
    return SL_OK;
}

static inline enum sl_status hear_column(void *context,
                                         const struct sl_column_use *use,
                                         struct sl_error *error)
{
    struct listener *listener = context;

    (void)error;
    sl_text_addf(&listener->heard, "column %s %d \"%s\" is \"%s\" in %s\n",
                 use->file, use->position, use->header, use->field,
                 use->unit ? use->unit->label : "-");
    return SL_OK;
}

static inline bool hear_progress(void *context, long long done, long long all)
{
    struct listener *listener = context;

    (void)done;
    (void)all;
    return ++listener->progress != listener->stop_at;
}

static inline struct sl_sink listener_sink(struct listener *listener)
{
    return (struct sl_sink){listener,     hear_record,  hear_aside,
                            hear_recall,  hear_finding, hear_column,
                            hear_progress};
}

static inline void listener_release(struct listener *listener)
{
    sl_text_release(&listener->heard);
}

/* Write the sums down too. */
static inline void listener_sums(struct listener *listener,
                                 const struct sl_inventory *inventory)
{
    for (int i = 0; i < SL_KIND_COUNT; i++) {
        const struct sl_file_sum *sum =
            sl_inventory_sum(inventory, (enum sl_kind)i);

        if (sum->present)
            sl_text_addf(&listener->heard,
                         "sum %s: %lld read, %lld kept, %lld rejected, %lld "
                         "out of scope\n",
                         sum->file, sum->read, sum->kept, sum->rejected,
                         sum->out_of_scope);
    }
}

#endif
