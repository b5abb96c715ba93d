/* Overlays basins and cells with GEOS each time a line comes in; answers with milliseconds and the area of all pieces.
   Polygons are made beforehand, and the spatial index by the first run, which does not count. A file is a sequence of rings: a double that holds
   the number of points, the first repeated at the end, then x and y of each. */
#include <geos_c.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

struct layer {
    size_t count;
    GEOSGeometry **polygons;
};

static struct layer read_layer(const char *path) {
    FILE *file = fopen(path, "rb");
    struct layer layer = {0, NULL};
    double points;
    if (!file) {
        exit(2);
    }
    while (fread(&points, sizeof points, 1, file) == 1) {
        size_t count = (size_t)points;
        double *values = malloc(2 * count * sizeof *values);
        if (fread(values, sizeof *values, 2 * count, file) != 2 * count) {
            exit(3);
        }
        GEOSCoordSequence *sequence = GEOSCoordSeq_copyFromBuffer(values, (unsigned)count, 0, 0);
        free(values);
        layer.polygons = realloc(layer.polygons, (layer.count + 1) * sizeof *layer.polygons);
        layer.polygons[layer.count++] = GEOSGeom_createPolygon(GEOSGeom_createLinearRing(sequence), NULL, 0);
    }
    fclose(file);
    return layer;
}

struct overlay {
    const GEOSGeometry *basin;
    double area;
};

static void add_piece(void *cell, void *context) {
    struct overlay *overlay = context;
    GEOSGeometry *piece = GEOSIntersection(overlay->basin, cell);
    double area;
    if (!piece || !GEOSArea(piece, &area)) {
        exit(4);
    }
    overlay->area += area;
    GEOSGeom_destroy(piece);
}

int main(int count, char **arguments) {
    char line[16];
    if (count != 3) {
        return 1;
    }
    initGEOS(NULL, NULL);
    struct layer cells = read_layer(arguments[1]);
    struct layer basins = read_layer(arguments[2]);
    GEOSSTRtree *tree = GEOSSTRtree_create(10);
    for (size_t i = 0; i < cells.count; i++) {
        GEOSSTRtree_insert(tree, cells.polygons[i], cells.polygons[i]);
    }
    printf("ready\n");
    fflush(stdout);
    while (fgets(line, sizeof line, stdin)) {
        struct timespec start, end;
        double total = 0;
        clock_gettime(CLOCK_MONOTONIC, &start);
        for (size_t i = 0; i < basins.count; i++) {
            struct overlay overlay = {basins.polygons[i], 0};
            GEOSSTRtree_query(tree, basins.polygons[i], add_piece, &overlay);
            total += overlay.area;
        }
        clock_gettime(CLOCK_MONOTONIC, &end);
        printf("%.3f %.17g\n", (end.tv_sec - start.tv_sec) * 1e3 + (end.tv_nsec - start.tv_nsec) / 1e6, total);
        fflush(stdout);
    }
    return 0;
}
