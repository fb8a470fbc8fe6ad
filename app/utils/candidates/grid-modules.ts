import {
  CellApiModule, CellStyleModule, ClientSideRowModelApiModule, ClientSideRowModelModule, ColumnApiModule, CustomEditorModule, EventApiModule,
  ModuleRegistry, RenderApiModule, RowApiModule, RowSelectionModule, ScrollApiModule,
} from 'ag-grid-community'

/** Registers the parts of the grid that the page uses, and no others. */
export function registerGridModules() {
  ModuleRegistry.registerModules([
    CellApiModule, CellStyleModule, ClientSideRowModelApiModule, ClientSideRowModelModule, ColumnApiModule, CustomEditorModule, EventApiModule,
    RenderApiModule, RowApiModule, RowSelectionModule, ScrollApiModule,
  ])
}
