// expect: parcel gated
module parcel_slot (
    input  logic        clk,
    input  logic        take, mark,
    input  logic [11:0] label,
    output logic [11:0] shown
);
    typedef struct packed { logic [3:0] zone; logic [7:0] street; } parcel_t;
    parcel_t parcel;
    assign shown = parcel;
    always_ff @(posedge clk) begin
        if (take) parcel <= label;
        if (mark) parcel.zone <= 4'hf;
    end
endmodule
